import { needWords } from "@/lib/domain/need-words";
import { parameterDefinition } from "@/lib/domain/parameters";
import { joinWords } from "@/lib/domain/sentences";
import { formatNumber } from "@/lib/domain/units";
import { axisWord } from "@/lib/review/axis-word";
import type { CurrentProvenance } from "@/lib/rules/types";
import { LevelMark } from "@/components/ui/level-mark";
import { Quantity } from "@/components/ui/quantity";

export interface ProvenanceStripProps {
  readonly provenance: CurrentProvenance;
}

function Outcome({ provenance: { rms, tolerance, missing } }: ProvenanceStripProps) {
  if (rms === null)
    return (
      <>
        <span className="provenance-text">
          <LevelMark level="cannot" />
        </span>
        <span className="provenance-from">
          {missing.length > 0 && `missing: ${joinWords(missing.map((path) => needWords(path).words))}`}
        </span>
      </>
    );
  return (
    <>
      <span className="provenance-text">
        <Quantity value={rms} unit="A" basis="rms" />
      </span>
      <span className="provenance-from">
        {tolerance === null ? "tolerance not known" : `± ${formatNumber(tolerance * 100, 2)} %`}
      </span>
    </>
  );
}

/** Where the current is known, the last step is that current itself; it is drawn as the outcome. */
function wayOf({ steps, rms }: CurrentProvenance): CurrentProvenance["steps"] {
  return rms === null ? steps : steps.slice(0, -1);
}

/** From the number typed to the current in the winding, one step after the other, each with where it comes from. */
export function ProvenanceStrip({ provenance }: ProvenanceStripProps) {
  const label = parameterDefinition(provenance.parameter).label.toLowerCase();
  const name = `${axisWord(provenance.axis)} ${label}`;
  return (
    <figure className="provenance">
      <figcaption>{name}</figcaption>
      <ol>
        {wayOf(provenance).map((step, index) => (
          <li key={index}>
            <span className="provenance-label">{step.label}</span>
            <span className="provenance-text">{step.text}</span>
            <span className="provenance-from">{step.from}</span>
          </li>
        ))}
        <li className="provenance-outcome">
          <span className="provenance-label">In the winding</span>
          <Outcome provenance={provenance} />
        </li>
      </ol>
    </figure>
  );
}
