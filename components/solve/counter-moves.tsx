import { parameterLabel } from "@/lib/domain/parameters";
import { joinWords } from "@/lib/domain/sentences";
import { formatNumber } from "@/lib/domain/units";
import { axisWord } from "@/lib/review/axis-word";
import type { CounterEdit, CounterRow } from "@/lib/review/counter-proposal";
import { checkWords, conflictSentence, counterSentence } from "@/lib/review/counter-words";
import { changeWords } from "@/components/findings/parameter-changes-table";
import { NoValue, ParameterQuantity } from "@/components/ui/quantity";
import { Head, NumberCell, Table } from "@/components/ui/table";
import type { Kinds } from "./kinds";

interface Place {
  readonly axis: string | null;
  readonly parameter: CounterRow["parameter"];
}

export function placeWords({ axis, parameter }: Place, kinds: Kinds): string {
  const label = parameterLabel(parameter, kinds[axis?.toLowerCase() ?? ""]);
  return axis === null ? label : `${axisWord(axis)} ${label.toLowerCase()}`;
}

function Row({ move, kinds }: { readonly move: CounterRow; readonly kinds: Kinds }) {
  const { parameter, was, toBe, change, because, also, path, line } = move;
  return (
    <tr>
      <th scope="row">
        {placeWords(move, kinds)}
        {also.length > 0 && `; the same key sets ${joinWords(also.map((one) => placeWords(one, kinds)))}`}
        <span className="quiet">
          {" "}
          {path}, line {line}
        </span>
      </th>
      <NumberCell>
        <ParameterQuantity parameter={parameter} {...was} />
      </NumberCell>
      <NumberCell className="to-be">
        <ParameterQuantity parameter={parameter} {...toBe} />
      </NumberCell>
      <NumberCell>{change === null ? <NoValue /> : changeWords(change)}</NumberCell>
      <td>{joinWords(because.map(checkWords))}</td>
    </tr>
  );
}

/** What a counter-proposal changes, why, and what it cannot clear. */
export function CounterMoves({ edit, kinds }: { readonly edit: CounterEdit; readonly kinds: Kinds }) {
  const { moves, cost, conflicts, leastShare } = edit;
  return (
    <>
      <p>{counterSentence(edit)}</p>
      {moves.length > 0 && (
        <Table caption="Counter-proposal" captionHidden className="changes">
          <thead>
            <tr>
              <Head>Parameter</Head>
              <Head number className="was-head">
                Was
              </Head>
              <Head number className="to-be-head">
                To be
              </Head>
              <Head number>Change</Head>
              <Head>Else over limit</Head>
            </tr>
          </thead>
          <tbody>
            {moves.map((move) => (
              <Row
                key={`${move.path} ${move.line} ${move.axis} ${move.parameter}`}
                move={move}
                kinds={kinds}
              />
            ))}
          </tbody>
        </Table>
      )}
      {moves.length > 0 && (
        <p className="quiet">
          Sum of the changes by the policy&rsquo;s weights: {formatNumber(cost * 100, 3)}&nbsp;%.
        </p>
      )}
      {conflicts.length > 0 && (
        <ul>
          {conflicts.map((conflict) => (
            <li key={conflict.checks.map(checkWords).join()}>{conflictSentence(conflict, leastShare)}</li>
          ))}
        </ul>
      )}
    </>
  );
}
