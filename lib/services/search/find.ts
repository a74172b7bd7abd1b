import "server-only";
import type { WhereOptions } from "sequelize";
import { Op } from "sequelize";
import type { Action } from "@/lib/domain/actions";
import { CATALOG_KIND_WORDS } from "@/lib/domain/catalog";
import { CHANGE_STATE_WORDS } from "@/lib/domain/change-states";
import { changeLabel } from "@/lib/domain/changes";
import { may } from "@/lib/policies/decide";
import { kindSlug } from "@/lib/schemas/catalog";
import type { SearchAnswer, SearchGroup, SearchHit, SearchQuery } from "@/lib/schemas/search";
import { CatalogItem, MachineModel, Site } from "@/models/catalog";
import { ChangeRequest } from "@/models/changes";
import { Machine } from "@/models/machines";
import { User } from "@/models/people";
import { containing } from "@/lib/services/catalog/filters";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { findPages } from "./pages";

const SHOWN = 8;
/** One more than is shown tells whether there are more. */
const ASKED = SHOWN + 1;

/** Every word in one of the columns. */
function everyWord(words: readonly string[], columns: readonly string[]): WhereOptions {
  const one = (word: string) => ({
    [Op.or]: columns.map((column) => ({ [column]: { [Op.iLike]: containing(word) } })),
  });
  return { [Op.and]: words.map(one) };
}

async function findMachines(words: readonly string[]): Promise<SearchHit[]> {
  const machines = await Machine.findAll({
    where: everyWord(words, ["serial", "note"]),
    include: ["model", "site"],
    order: [["serial", "ASC"]],
    limit: ASKED,
  });
  return machines.map(({ id, serial, model, site }) => ({
    href: `/machines/${id}`,
    title: serial,
    note: [model?.name, site?.name].filter(Boolean).join(", "),
  }));
}

/** "CR-0042", "cr 42" and "42" are the number of a change. */
function numberIn(q: string): number | null {
  const digits = /^(?:cr[\s-]*)?0*(\d{1,8})$/i.exec(q)?.[1];
  return digits === undefined ? null : Number(digits);
}

async function findChanges(words: readonly string[], q: string): Promise<SearchHit[]> {
  const number = numberIn(q);
  const inWords = everyWord(words, ["title", "reason", "authorName"]);
  const changes = await ChangeRequest.findAll({
    where: number === null ? inWords : { [Op.or]: [{ number }, inWords] },
    order: [["number", "DESC"]],
    limit: ASKED,
  });
  return changes.map((change) => ({
    href: `/changes/${change.id}`,
    title: `${changeLabel(change.number)} ${change.title}`,
    note: CHANGE_STATE_WORDS[change.state],
  }));
}

async function findItems(words: readonly string[]): Promise<SearchHit[]> {
  const items = await CatalogItem.findAll({
    where: everyWord(words, ["code", "name"]),
    order: [["code", "ASC"]],
    limit: ASKED,
  });
  return items.map(({ id, kind, code, name }) => ({
    href: `/catalog/${kindSlug(kind)}/${id}`,
    title: `${code} ${name}`,
    note: CATALOG_KIND_WORDS[kind].one,
  }));
}

async function findModels(words: readonly string[]): Promise<SearchHit[]> {
  const where = everyWord(words, ["code", "name"]);
  const models = await MachineModel.findAll({ where, order: [["code", "ASC"]], limit: ASKED });
  return models.map(({ id, code, name }) => ({
    href: `/catalog/models/${id}`,
    title: `${code} ${name}`,
    note: "machine model",
  }));
}

async function findSites(words: readonly string[]): Promise<SearchHit[]> {
  const where = everyWord(words, ["code", "name"]);
  const sites = await Site.findAll({ where, order: [["code", "ASC"]], limit: ASKED });
  return sites.map(({ id, code, name }) => ({
    href: `/floor?siteId=${id}`,
    title: `${code} ${name}`,
    note: "site, on the floor",
  }));
}

async function findPeople(words: readonly string[]): Promise<SearchHit[]> {
  const where = everyWord(words, ["name", "email"]);
  const people = await User.findAll({ where, order: [["name", "ASC"]], limit: ASKED });
  return people.map(({ id, name, email, role }) => ({
    href: `/settings/people/${id}`,
    title: name,
    note: `${role}, ${email}`,
  }));
}

interface Source {
  readonly title: string;
  readonly action: Action;
  readonly find: (words: readonly string[], q: string) => Promise<SearchHit[]>;
}

const SOURCES: readonly Source[] = [
  { title: "Machines", action: "machines.read", find: findMachines },
  { title: "Changes", action: "changes.read", find: findChanges },
  { title: "Machine models", action: "catalog.read", find: findModels },
  { title: "Hardware", action: "catalog.read", find: findItems },
  { title: "Sites", action: "catalog.read", find: findSites },
  { title: "People", action: "users.read", find: findPeople },
];

function groupOf(title: string, hits: readonly SearchHit[]): SearchGroup {
  return { title, hits: hits.slice(0, SHOWN), more: hits.length > SHOWN };
}

/** Things and acts that answer to every word, as far as the actor may see them. */
export async function search(context: Context, { q }: SearchQuery): Promise<SearchAnswer> {
  authorize(context, "search.read");
  const words = q.toLowerCase().split(/\s+/).filter(Boolean);
  if (words.length === 0) return { q, groups: [] };
  const open = SOURCES.filter((source) => may(context.actor, source.action));
  const found = await Promise.all(
    open.map(async (source) => groupOf(source.title, await source.find(words, q))),
  );
  const groups = [groupOf("Acts and pages", findPages(context, words)), ...found];
  return { q, groups: groups.filter((group) => group.hits.length > 0) };
}
