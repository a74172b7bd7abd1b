import { parameterLabel } from "@/lib/domain/parameters";
import { onAxis } from "@/lib/review/axis-word";
import type { Respelled, Spelling } from "@/lib/review/respelled";
import { CodeText } from "@/components/revision/code-text";

export interface RespelledValuesProps {
  readonly values: readonly Respelled[];
}

/** Says of values that are only written otherwise that they are no change. */
export function RespelledValues({ values }: RespelledValuesProps) {
  if (values.length === 0) return null;
  return (
    <>
      <p className="quiet">Written otherwise, with the same value; no change:</p>
      <ul>
        {values.map(({ axis, parameter, was, toBe }) => (
          <li key={`${axis}|${parameter}`}>
            {onAxis(axis, parameterLabel(parameter).toLowerCase())}: <Written spelling={was} /> →{" "}
            <Written spelling={toBe} />{" "}
            <span className="quiet">
              {toBe.path}, line {toBe.line}
            </span>
          </li>
        ))}
      </ul>
    </>
  );
}

/** The value as written, with its unit where the key table and not the text has it. */
function Written({ spelling: { raw, unit } }: { readonly spelling: Spelling }) {
  const behind = unit === null || unit === "" || raw.includes(unit) ? "" : ` ${unit}`;
  return (
    <code className="code">
      <CodeText text={raw} />
      {behind}
    </code>
  );
}
