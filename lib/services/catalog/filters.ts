import "server-only";
import type { WhereOptions } from "sequelize";
import { Op } from "sequelize";

interface Sought {
  readonly q?: string | undefined;
  readonly retired: "yes" | "no" | "all";
}

/** `%` and `_` stand for themselves. */
export function containing(words: string): string {
  return `%${words.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
}

/** What has this part in its code or name, in use or retired. */
export function soughtWhere({ q, retired }: Sought): WhereOptions {
  const inUse = { yes: { retiredAt: { [Op.ne]: null } }, no: { retiredAt: null }, all: {} }[retired];
  if (!q) return inUse;
  const like = { [Op.iLike]: containing(q) };
  return { [Op.and]: [inUse, { [Op.or]: [{ code: like }, { name: like }] }] };
}

export function pageBounds({ page, pageSize }: { page: number; pageSize: number }): {
  limit: number;
  offset: number;
} {
  return { limit: pageSize, offset: (page - 1) * pageSize };
}
