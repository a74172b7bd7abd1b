import "server-only";
import type { Assembly } from "@/lib/domain/assembly";
import type { KeyTable } from "@/lib/domain/key-table";
import type { Policy } from "@/lib/domain/policy";
import type { ChangeKind } from "@/lib/domain/changes";
import { MachineModel } from "@/models/catalog";
import { ChangeRequest } from "@/models/changes";
import { Machine } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { currentKeyTable } from "@/lib/services/key-tables/current";
import { currentPolicy } from "@/lib/services/policies/ensure";
import type { StoredFile } from "@/lib/services/revisions/files";
import { proposalBase } from "./base";
import { machinesOf } from "./effectivity";
import { proposalAssembly } from "./evaluate";
import type { ChangeView } from "./show";
import { showChange } from "./show";

/** What the editor of a proposal starts from: the base's text and all that the checks need in the browser. */
export interface ProposalStart {
  readonly kind: ChangeKind;
  readonly model: { readonly id: string; readonly code: string; readonly name: string };
  readonly machine: { readonly id: string; readonly serial: string } | null;
  readonly baseLabel: string;
  readonly files: readonly { path: string; format: StoredFile["format"]; text: string }[];
  readonly keyTable: KeyTable;
  readonly assembly: Assembly;
  readonly policy: Policy;
  readonly ambientC: number | null;
  readonly sites: readonly { id: string; name: string; machines: number }[];
  readonly machines: readonly { id: string; serial: string; siteName: string }[];
}

type Target = { readonly modelId: string } | { readonly machineId: string };

export async function proposalStart(context: Context, target: Target): Promise<ProposalStart> {
  authorize(context, "changes.create");
  const machine = "machineId" in target ? await Machine.findByPk(target.machineId) : null;
  if ("machineId" in target && !machine) throw notFound("machine");
  const model = await MachineModel.findByPk(machine?.modelId ?? ("modelId" in target ? target.modelId : ""));
  if (!model) throw notFound("machine model");
  const kind = machine ? ("deviation" as const) : ("baseline" as const);
  const scope = { kind, modelId: model.id, machineId: machine?.id ?? null };
  const machines = await machinesOf({ modelId: model.id, effectivity: { kind: "model" } });
  const base = await proposalBase({ ...scope, asOf: context.now });
  const assembly = await proposalAssembly(scope, machines);
  return {
    kind,
    model: { id: model.id, code: model.code, name: model.name },
    machine: machine && { id: machine.id, serial: machine.serial },
    baseLabel: base.label,
    files: base.files.map(({ path, format, text }) => ({ path, format, text })),
    keyTable: (await currentKeyTable(model.id)).table,
    assembly,
    policy: (await currentPolicy()).policy,
    ambientC: assembly.ambient_c ?? null,
    sites: sitesOf(machines),
    machines: machines.map(({ id, serial, site }) => ({ id, serial, siteName: site?.name ?? "" })),
  };
}

function sitesOf(machines: readonly Machine[]): ProposalStart["sites"] {
  const sites = new Map<string, { id: string; name: string; machines: number }>();
  for (const { siteId, site } of machines) {
    const known = sites.get(siteId) ?? { id: siteId, name: site?.name ?? "", machines: 0 };
    sites.set(siteId, { ...known, machines: known.machines + 1 });
  }
  return [...sites.values()].sort((a, b) => (a.name < b.name ? -1 : 1));
}

/** The same for a change that exists: its base as the change was made on, and the change itself. */
export async function editStart(
  context: Context,
  id: string,
): Promise<ProposalStart & { readonly change: ChangeView }> {
  authorize(context, "changes.edit");
  const row = await ChangeRequest.findByPk(id);
  if (!row) throw notFound("change");
  const change = await showChange(context, id);
  const start = await proposalStart(
    context,
    row.machineId ? { machineId: row.machineId } : { modelId: row.modelId },
  );
  // Stored files have a format with a parser.
  const files = change.base.files.map((file) => ({ ...file, format: file.format as StoredFile["format"] }));
  return { ...start, files, baseLabel: change.base.label, change };
}
