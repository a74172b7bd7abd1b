import { MACHINE_STATE_WORDS } from "@/lib/domain/machines";
import { LAYER_WORDS, LAYERS } from "@/lib/domain/readings";
import type { MachineSheet } from "@/lib/schemas/machines-read";
import { DateTime } from "@/components/ui/date-time";
import { Facts, type Fact } from "@/components/ui/facts";
import { Quantity } from "@/components/ui/quantity";

type Known = Pick<
  MachineSheet,
  | "state"
  | "stateReason"
  | "note"
  | "site"
  | "model"
  | "ambientC"
  | "hasReadBack"
  | "standingReadings"
  | "stale"
>;

function layerFacts({ standingReadings, stale }: Known): Fact[] {
  return LAYERS.map((layer) => {
    const reading = standingReadings.find((standing) => standing.layer === layer);
    const label = `Last read: ${LAYER_WORDS[layer]}`;
    if (!reading) return { label, value: <span className="quiet">not read</span> };
    const firmware = reading.firmwareVersion === null ? "" : `firmware ${reading.firmwareVersion}`;
    const note = [firmware, stale ? "some values are stale" : ""].filter(Boolean).join(", ");
    const value = (
      <a href={`/readings/${reading.readingId}`}>
        <DateTime value={reading.readAt} />
      </a>
    );
    return { label, value, ...(note === "" ? {} : { note }) };
  });
}

/** Where a machine is, in which state, and when each layer was read. */
export function MachineFacts({ machine }: { readonly machine: Known }) {
  const { state, stateReason, site, model, ambientC, hasReadBack, note } = machine;
  const facts: Fact[] = [
    {
      label: "State",
      value: MACHINE_STATE_WORDS[state],
      ...(stateReason === "" ? {} : { note: stateReason }),
    },
    {
      label: "Machine model",
      value: <a href={`/catalog/models/${model.id}`}>{`${model.code} ${model.name}`}</a>,
    },
    {
      label: "Site",
      value: site.name,
      note:
        ambientC === null ? (
          "ambient temperature not known"
        ) : (
          <>
            ambient up to <Quantity value={ambientC} unit="°C" />
          </>
        ),
    },
    { label: "Read-back", value: hasReadBack ? "stored or running values can be read" : "none" },
    ...layerFacts(machine),
    ...(note === "" ? [] : [{ label: "Note", value: note }]),
  ];
  return <Facts facts={facts} />;
}
