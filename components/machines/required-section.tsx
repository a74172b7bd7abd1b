import Link from "next/link";
import { parameterDefinition } from "@/lib/domain/parameters";
import { joinWords } from "@/lib/domain/sentences";
import { onAxis } from "@/lib/review/axis-word";
import type { DeviationView, MachineSheet } from "@/lib/schemas/machines-read";
import { MarkedText } from "@/components/revision/marked-text";
import { DateTime } from "@/components/ui/date-time";
import { fileSize } from "@/components/ui/file-size";

export interface RequiredSectionProps {
  readonly machineId: string;
  readonly required: NonNullable<MachineSheet["required"]>;
  /** Shown for a day in the past: nothing to be put onto the machine. */
  readonly past: boolean;
}

function DeviationLine({ deviation }: { readonly deviation: DeviationView }) {
  const { parameters, untilOn, approvedByName, reason, changeId } = deviation;
  const words = parameters.map(({ axis, parameter }) =>
    onAxis(axis, parameterDefinition(parameter).label.toLowerCase()),
  );
  return (
    <li>
      Permitted deviation of {joinWords(words)}, until {untilOn}, approved by {approvedByName}: {reason}
      {changeId !== null && (
        <>
          {" "}
          <Link href={`/changes/${changeId}`}>the change</Link>
        </>
      )}
    </li>
  );
}

/** What a machine has to run today: baseline, permitted deviations, and the exact text with its download. */
export function RequiredSection({ machineId, required, past }: RequiredSectionProps) {
  const { baseline, deviations, files, refused } = required;
  return (
    <>
      <p>
        Baseline {baseline.number}, in force here since <DateTime value={baseline.since} />
        {deviations.length === 0 ? ", without a permitted deviation." : "."}
      </p>
      <ul>
        {deviations.map((deviation) => (
          <DeviationLine key={deviation.id} deviation={deviation} />
        ))}
        {refused.map(({ axis, parameter, reason }) => (
          <li key={`${axis ?? ""} ${parameter}`}>The deviation has no place in the text: {reason}</li>
        ))}
      </ul>
      {!past && (
        <p className="caution">
          Before you put it onto the machine: expect hot surfaces and unexpected motion, and support a
          vertical axis, which falls when its holding current is cut.
        </p>
      )}
      {files.map(({ position, path, text, size, sha256 }, index) => (
        <details key={path} open={files.length === 1}>
          <summary>
            <span className="code">{path}</span>{" "}
            <span className="quiet" title={sha256}>
              {fileSize(size)}, SHA-256 {sha256.slice(0, 12)}…
            </span>
          </summary>
          {!past && (
            <p className="my-2">
              <a
                className="button button-plain"
                href={`/api/v1/machines/${machineId}/required-text?file=${position}`}
                download
              >
                Save the exact text
              </a>
            </p>
          )}
          <MarkedText text={text} path={path} index={index} />
        </details>
      ))}
    </>
  );
}
