import "server-only";
import type { WhereOptions } from "sequelize";
import { Op } from "sequelize";
import type { UserPage, UserQuery } from "@/lib/schemas/people";
import { User } from "@/models/people";
import { containing, pageBounds } from "@/lib/services/catalog/filters";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { presentUsers } from "./present";

function condition({ q, active }: UserQuery): WhereOptions {
  const state = { yes: { active: true }, no: { active: false }, all: {} }[active];
  if (!q) return state;
  const like = { [Op.iLike]: containing(q) };
  return { [Op.and]: [state, { [Op.or]: [{ name: like }, { email: like }] }] };
}

/** People by name. */
export async function listUsers(context: Context, query: UserQuery): Promise<UserPage> {
  authorize(context, "users.read");
  const { rows, count } = await User.findAndCountAll({
    where: condition(query),
    order: [
      ["name", "ASC"],
      ["id", "ASC"],
    ],
    ...pageBounds(query),
  });
  return {
    items: await presentUsers(rows, { now: context.now }),
    page: query.page,
    pageSize: query.pageSize,
    total: count,
  };
}
