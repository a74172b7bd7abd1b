import "server-only";
import type { ChangeViewData } from "@/lib/schemas/changes";
import { Site } from "@/models/catalog";
import { Attachment, LotMachine, Verification } from "@/models/implementation";
import { Machine } from "@/models/machines";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { proofOf } from "@/lib/services/implementation/proof";

type MachineView = ChangeViewData["machines"][number];

/** The machines that a change was released to: released, applied and verified kept apart, with their tests. */
export async function machinesOfChange(context: Context, changeId: string): Promise<MachineView[]> {
  authorize(context, "changes.read");
  const places = await LotMachine.findAll({ where: { changeId } });
  const machines = await Machine.findAll({
    where: { id: places.map(({ machineId }) => machineId) },
    include: [{ model: Site, as: "site" }],
  });
  const tests = await testsOf(changeId);
  const byId = new Map(machines.map((machine) => [machine.id, machine]));
  const views = places.map((place) =>
    placeView(place, { machine: byId.get(place.machineId), tests, now: context.now }),
  );
  return (await Promise.all(views)).sort((a, b) => (a.serial < b.serial ? -1 : 1));
}

interface Facts {
  readonly machine: Machine | undefined;
  readonly tests: ReadonlyMap<string, MachineView["verifications"]>;
  readonly now: Date;
}

async function placeView(place: LotMachine, { machine, tests, now }: Facts): Promise<MachineView> {
  const closed = place.verifiedAt !== null || place.endedAt !== null;
  return {
    machineId: place.machineId,
    serial: machine?.serial ?? "",
    siteName: machine?.site?.name ?? "",
    releasedAt: place.releasedAt.toISOString(),
    downloadedAt: place.downloadedAt?.toISOString() ?? null,
    appliedAt: place.appliedAt?.toISOString() ?? null,
    appliedReadingId: place.appliedReadingId,
    verifiedAt: place.verifiedAt?.toISOString() ?? null,
    endedAt: place.endedAt?.toISOString() ?? null,
    missing: closed ? null : (await proofOf(place, now)).missing,
    verifications: tests.get(place.id) ?? [],
  };
}

async function testsOf(changeId: string): Promise<Map<string, MachineView["verifications"]>> {
  const rows = await Verification.findAll({ where: { changeId }, order: [["at", "DESC"]] });
  const attachments = await Attachment.findAll({ where: { verificationId: rows.map(({ id }) => id) } });
  const byPlace = new Map<string, MachineView["verifications"]>();
  for (const row of rows) {
    const own = attachments.filter(({ verificationId }) => verificationId === row.id);
    const list = byPlace.get(row.lotMachineId) ?? [];
    list.push(testView(row, own));
    byPlace.set(row.lotMachineId, list);
  }
  return byPlace;
}

function testView(
  row: Verification,
  attachments: readonly Attachment[],
): MachineView["verifications"][number] {
  const { id, tested, result, ambientC, temperatures, note, statement, actorName } = row;
  return {
    id,
    tested,
    result,
    ambientC,
    temperatures,
    note,
    statement,
    actorName,
    at: row.at.toISOString(),
    attachments: attachments.map(({ id: fileId, name, size, mediaType }) => ({
      id: fileId,
      name,
      size,
      mediaType,
    })),
  };
}
