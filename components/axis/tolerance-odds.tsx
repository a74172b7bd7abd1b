"use client";

import { useId, useMemo } from "react";
import { needWords } from "@/lib/domain/need-words";
import { joinWords } from "@/lib/domain/sentences";
import { formatNumber } from "@/lib/domain/units";
import { mapFiles, parseFile } from "@/lib/review/check";
import { USUAL_SPREADS, type LimitOdds, type OddsReport } from "@/lib/review/tolerance-odds";
import { ruleTitle } from "@/lib/rules/titles";
import type { RuleInput } from "@/lib/rules/types";
import { Limit } from "@/components/findings/limit";
import { LevelMark } from "@/components/ui/level-mark";
import { Notice } from "@/components/ui/notice";
import { NoValue, Quantity } from "@/components/ui/quantity";
import { SheetSection } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { ToleranceForm, type OddsChoice } from "./tolerance-form";
import type { AxisBasis } from "./types";
import { useToleranceOdds, type OddsState } from "./use-tolerance-odds";

function inputOf({ files, keyTable, assembly, policy }: AxisBasis): RuleInput {
  const { parameters } = mapFiles(files.map(parseFile), { keyTable, assembly });
  return { parameters, assembly, policy };
}

/** The chance that each limit of the axis is crossed when its data are as uncertain as they are, beside the nominal verdict. */
export function ToleranceOdds({ basis }: { readonly basis: AxisBasis }) {
  const { state, start, stop } = useToleranceOdds();
  const input = useMemo(() => inputOf(basis), [basis]);
  const begin = ({ samples, seed, ...spreads }: OddsChoice): void =>
    start({ input, axis: basis.axis, spreads, samples, seed });
  const spreads = { ...USUAL_SPREADS, supply: basis.assembly.supply?.tolerance ?? USUAL_SPREADS.supply };
  return (
    <SheetSection title="Tolerance odds" id="tolerance-odds" note="the chance of crossing each limit">
      <ToleranceForm spreads={spreads} running={state.phase === "running"} onStart={begin} onStop={stop} />
      <Progress state={state} />
      {state.phase === "done" && <Report report={state.report} />}
    </SheetSection>
  );
}

function Progress({ state }: { readonly state: OddsState }) {
  const id = useId();
  if (state.phase === "failed")
    return (
      <Notice live="alert" title="Not worked out">
        <p>{state.reason}</p>
      </Notice>
    );
  if (state.phase !== "running" && state.phase !== "stopped") return null;
  const percent = Math.floor(state.share * 100);
  return (
    <div className="my-4">
      <label htmlFor={id}>
        {state.phase === "running"
          ? `Drawing samples, ${percent} % done`
          : `Stopped at ${percent} %. Nothing is shown of a part; start it again to see the whole.`}
      </label>
      <progress id={id} className="block w-full" max={1} value={state.share} />
    </div>
  );
}

function Report({ report: { limits, cannot, samples } }: { readonly report: OddsReport }) {
  return (
    <>
      <Table caption={`Chance of each limit, from ${samples} samples`}>
        <thead>
          <tr>
            <Head>Check</Head>
            <Head>As stated</Head>
            <Head number>Value</Head>
            <Head number>Limit</Head>
            <Head number>9 of 10 between</Head>
            <Head number>Over limit</Head>
            <Head number>Near or over</Head>
          </tr>
        </thead>
        <tbody>
          {limits.map((limit) => (
            <LimitRow key={limit.ruleId} odds={limit} samples={samples} />
          ))}
        </tbody>
      </Table>
      {cannot.length > 0 && (
        <ul>
          {cannot.map(({ ruleId, needs }) => (
            <li key={ruleId}>
              <LevelMark level="cannot" /> {ruleTitle(ruleId)}
              {needs.length > 0 && `; missing: ${joinWords(needs.map((path) => needWords(path).words))}`}
            </li>
          ))}
        </ul>
      )}
      <p className="quiet">
        Each datum is drawn evenly within its bounds and by itself. A chance stands with its standard error;
        where no sample was over, “below” is what 95 % of such runs would have noticed.
      </p>
    </>
  );
}

function LimitRow({ odds, samples }: { readonly odds: LimitOdds; readonly samples: number }) {
  const { ruleId, level, value, limit, limitSense, unit, low, high, over, standardError, nearOrOver } = odds;
  return (
    <tr>
      <th scope="row">{ruleTitle(ruleId)}</th>
      <td>
        <LevelMark level={level} />
      </td>
      <NumberCell>
        <Quantity value={value} unit={unit} />
      </NumberCell>
      <NumberCell>
        <Limit limit={limit} sense={limitSense} unit={unit} />
      </NumberCell>
      <NumberCell>
        {low === null || high === null ? (
          <NoValue />
        ) : (
          <>
            <Quantity value={low} unit={unit} /> and <Quantity value={high} unit={unit} />
          </>
        )}
      </NumberCell>
      <NumberCell>{chanceWords({ chance: over, standardError, samples })}</NumberCell>
      <NumberCell>{percentWords(nearOrOver)}</NumberCell>
    </tr>
  );
}

function percentWords(share: number): string {
  return `${formatNumber(share * 100, 3)}\u00a0%`;
}

interface Chance {
  readonly chance: number;
  readonly standardError: number;
  readonly samples: number;
}

/** "12.3 % ± 0.7 %"; for none of n samples "below 3/n", the rule of three. */
function chanceWords({ chance, standardError, samples }: Chance): string {
  if (chance === 0) return `below ${percentWords(3 / samples)}`;
  if (chance === 1) return `above ${percentWords(1 - 3 / samples)}`;
  return `${percentWords(chance)} ± ${formatNumber(standardError * 100, 2)}\u00a0%`;
}
