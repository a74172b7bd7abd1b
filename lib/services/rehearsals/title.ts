import "server-only";
import type { Transaction } from "sequelize";
import type { RehearsalQuestion } from "@/lib/domain/rehearsals";
import { formatNumber } from "@/lib/domain/units";
import { CatalogItem } from "@/models/catalog";
import { ServiceError } from "@/lib/services/kernel/errors";

/** What was asked, in words that stay true when a catalog item gets another name; refuses items that are not there. */
export async function rehearsalTitle(question: RehearsalQuestion, transaction: Transaction): Promise<string> {
  if (question.kind === "warm_day")
    return `Warm day, ${formatNumber(question.riseK, 3)} K above each site's maximum`;
  const { part, itemId, replacesId } = question;
  if (itemId === replacesId)
    throw new ServiceError("invalid", `The same ${part} would take its own place. Choose another one.`, {
      pointer: "/question/itemId",
    });
  const words = async (id: string, pointer: string): Promise<string> => {
    const item = await CatalogItem.findOne({ where: { id, kind: part }, transaction });
    if (item) return `${item.code} ${item.name}`;
    throw new ServiceError("invalid", `There is no such ${part} in the catalog. Nothing was started.`, {
      pointer,
    });
  };
  const fitted = `${part === "motor" ? "Motor" : "Driver"} ${await words(itemId, "/question/itemId")}`;
  if (replacesId === null) return `${fitted} in place of every ${part}`;
  return `${fitted} in place of ${await words(replacesId, "/question/replacesId")}`;
}
