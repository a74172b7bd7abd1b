import "server-only";
import type { Transaction, WhereOptions } from "sequelize";
import type { Effectivity } from "@/lib/domain/changes";
import { joinWords, plural } from "@/lib/domain/sentences";
import { Site } from "@/models/catalog";
import { Machine } from "@/models/machines";
import { ServiceError } from "@/lib/services/kernel/errors";

interface Sought {
  readonly modelId: string;
  readonly effectivity: Effectivity;
  readonly transaction?: Transaction | undefined;
}

function whereOf({ modelId, effectivity }: Sought): WhereOptions<Machine> {
  const inService = { modelId, state: "in_service" as const };
  if (effectivity.kind === "sites") return { ...inService, siteId: effectivity.siteIds };
  if (effectivity.kind === "machines") return { ...inService, id: effectivity.machineIds };
  return inService;
}

/** The machines that a change applies to today: those in service, by serial number, each with its site. */
export function machinesOf(sought: Sought): Promise<Machine[]> {
  return Machine.findAll({
    where: whereOf(sought),
    include: [{ model: Site, as: "site", required: true }],
    order: [["serial", "ASC"]],
    transaction: sought.transaction ?? null,
  });
}

/** "12 machines in North hall", "DG-104". */
export function effectivityWords(effectivity: Effectivity, machines: readonly Machine[]): string {
  if (machines.length === 0) return "no machine in service";
  if (effectivity.kind === "machines" && machines.length <= 3)
    return joinWords(machines.map(({ serial }) => serial));
  const sites = [...new Set(machines.map(({ site }) => site?.name ?? ""))].sort();
  return `${plural(machines.length, "machine")} in ${joinWords(sites)}`;
}

/** Refuses machines of another model and sites that are not there, with the field. */
export async function demandEffectivity({ modelId, effectivity, transaction }: Sought): Promise<void> {
  if (effectivity.kind === "model") return;
  const [asked, found] =
    effectivity.kind === "sites"
      ? [
          effectivity.siteIds,
          await Site.count({ where: { id: effectivity.siteIds }, transaction: transaction ?? null }),
        ]
      : [
          effectivity.machineIds,
          await Machine.count({
            where: { id: effectivity.machineIds, modelId },
            transaction: transaction ?? null,
          }),
        ];
  if (new Set(asked).size === found) return;
  throw new ServiceError(
    "invalid",
    "The effectivity names a site or machine that is not there or is of another model.",
    {
      pointer: "/effectivity",
    },
  );
}
