"use client";

import { useState } from "react";
import { Facts } from "@/components/ui/facts";
import { Notice } from "@/components/ui/notice";
import { Quantity } from "@/components/ui/quantity";
import { Head, NumberCell, Table } from "@/components/ui/table";
import type { AxisKind } from "@/lib/domain/axis-kind";
import { formatNumber, shownUnit, showText } from "@/lib/domain/units";
import { swingSentence, verdictSentence, voltageSentence } from "@/lib/review/move-sentence";
import type { CurrentMoment, MoveMoment } from "@/lib/review/move-traces";
import type { MoveReport } from "@/lib/review/virtual-move";
import { TraceChart } from "./trace-chart";
import { rangeOf, type Range } from "./trace-scale";

export interface VirtualMoveReportProps {
  readonly report: MoveReport;
  readonly kind: AxisKind;
  /** Travel for one radian of the motor, m (rad). */
  readonly radius: number;
}

/** Full steps at which a rotor falls out of step. */
const OUT_OF_STEP = 2;

/** What a virtual move came to: the verdict, then lag, speed and currents over time. */
export function VirtualMoveReport({ report, kind, radius }: VirtualMoveReportProps) {
  const { outcome } = report;
  const told = { report, kind, radius };
  return (
    <>
      <div className="my-4">
        <Notice live="status" title={outcome.verdict === "kept" ? "No step lost" : "Steps lost"}>
          <p>{verdictSentence(told)}</p>
          <p>{swingSentence(told)}</p>
          <p>{voltageSentence(told)}</p>
        </Notice>
      </div>
      <Facts
        facts={[
          { label: "Duration of the move", value: <Quantity value={outcome.moveTime} unit="s" /> },
          {
            label: "Highest speed",
            value: <Quantity value={report.peakSpeed} unit={kind === "rotary" ? "rad/s" : "m/s"} />,
          },
          { label: "Peak current set", value: <Quantity value={report.peakCurrent} unit="A" basis="peak" /> },
          {
            label: "Lag at the end",
            value: (
              <Quantity value={Math.round(outcome.restLag * 1000) / 1000 + 0} unit="full steps" digits={2} />
            ),
            note: "beside lost steps",
          },
          {
            label: "Integration step",
            value: <Quantity value={report.step} unit="s" />,
            note: `${report.steps} steps`,
          },
        ]}
      />
      <Courses moments={report.moments} kind={kind} />
      <Currents currents={report.currents} lost={outcome.broke !== null} />
    </>
  );
}

/** Lag and speed over the whole move, read off together. */
function Courses({ moments, kind }: { readonly moments: readonly MoveMoment[]; readonly kind: AxisKind }) {
  const [cursor, setCursor] = useState(() => largestLagOf(moments));
  const speed = shownUnit(kind === "rotary" ? "rad/s" : "m/s");
  const times = moments.map(({ time }) => time);
  const lag = {
    low: moments.map((moment) => moment.lag.low),
    high: moments.map((moment) => moment.lag.high),
  };
  const real = {
    low: moments.map((moment) => moment.speed.low * speed.factor),
    high: moments.map((moment) => moment.speed.high * speed.factor),
  };
  const commanded = moments.map((moment) => moment.commandedSpeed * speed.factor);
  const words = momentWords(moments[cursor], kind);
  const shared = { times, cursor, onCursor: setCursor };
  return (
    <>
      <TraceChart
        {...shared}
        title="Rotor behind the command"
        unit="full steps; out of step beyond ±2"
        range={lagRange([...lag.low, ...lag.high])}
        limit={OUT_OF_STEP}
        traces={[{ name: "lag", ink: "now", ...lag }]}
        reading={words.lag}
      />
      <TraceChart
        {...shared}
        title="Speed of the axis"
        unit={speed.unit}
        range={rangeOf([...real.low, ...real.high, ...commanded, 0])}
        traces={[
          { name: "real", ink: "now", ...real },
          { name: "commanded", ink: "was", low: commanded, high: commanded },
        ]}
        reading={words.speed}
      />
      <CursorField
        times={times}
        cursor={cursor}
        onCursor={setCursor}
        words={`${words.lag}; ${words.speed}`}
        label="Read off lag and speed at"
      />
      <MomentTable moments={moments} kind={kind} />
    </>
  );
}

function largestLagOf(moments: readonly MoveMoment[]): number {
  const size = ({ lag }: MoveMoment): number => Math.max(lag.high, -lag.low);
  return moments.reduce((best, moment, index) => {
    const known = moments[best];
    return known && size(moment) > size(known) ? index : best;
  }, 0);
}

/** The lag fills its chart; the limit comes into sight where the lag gets near it. */
function lagRange(values: readonly number[]): Range {
  const range = rangeOf([...values, 0]);
  const near = Math.max(range.high, -range.low) > OUT_OF_STEP / 2;
  return near ? rangeOf([...values, -1.2 * OUT_OF_STEP, 1.2 * OUT_OF_STEP]) : range;
}

function momentWords(
  moment: MoveMoment | undefined,
  kind: AxisKind,
): { readonly lag: string; readonly speed: string } {
  if (!moment) return { lag: "", speed: "" };
  const unit = kind === "rotary" ? "rad/s" : "m/s";
  const at = `At ${showText(moment.time, "s")}`;
  const speeds = (low: number, high: number): string => {
    const [least, most] = [showText(low, unit), showText(high, unit)];
    return least === most ? least : `${least} to ${most}`;
  };
  return {
    lag: `${at}: ${fromTo(moment.lag)} full steps`,
    speed: `${at}: ${showText(moment.commandedSpeed, unit)} commanded, ${speeds(moment.speed.low, moment.speed.high)} real`,
  };
}

function fromTo({ low, high }: { readonly low: number; readonly high: number }): string {
  const [least, most] = [formatNumber(low, 2), formatNumber(high, 2)];
  return (least === most ? least : `${least} to ${most}`).replaceAll("-", "\u2212");
}

/** Both phase currents around the largest lag, in their own time. */
function Currents({
  currents,
  lost,
}: {
  readonly currents: readonly CurrentMoment[];
  readonly lost: boolean;
}) {
  const [cursor, setCursor] = useState(0);
  const times = currents.map(({ time }) => time);
  const a = currents.map((moment) => moment.a);
  const b = currents.map((moment) => moment.b);
  const now = currents[cursor];
  const reading = now
    ? `At ${showText(now.time, "s", 4)}: phase a ${showText(now.a, "A")}, phase b ${showText(now.b, "A")}`
    : "";
  return (
    <>
      <TraceChart
        title={lost ? "Phase currents around the loss of step" : "Phase currents around the largest lag"}
        unit="A"
        times={times}
        range={rangeOf([...a, ...b])}
        traces={[
          { name: "phase a", ink: "now", low: a, high: a },
          { name: "phase b", ink: "was", low: b, high: b },
        ]}
        cursor={cursor}
        onCursor={setCursor}
        reading={reading}
      />
      <CursorField
        times={times}
        cursor={cursor}
        onCursor={setCursor}
        words={reading}
        label="Read off currents at"
      />
    </>
  );
}

function CursorField(props: {
  readonly label: string;
  readonly times: readonly number[];
  readonly cursor: number;
  readonly onCursor: (index: number) => void;
  readonly words: string;
}) {
  return (
    <label className="trace-slider">
      <span>{props.label}</span>
      <input
        type="range"
        min={0}
        max={Math.max(0, props.times.length - 1)}
        value={props.cursor}
        aria-valuetext={props.words}
        onChange={(event) => props.onCursor(Number(event.currentTarget.value))}
      />
    </label>
  );
}

/** Rows of the table. */
const ROWS = 24;

/** The drawn numbers, thinned to a table that can be read and copied. */
function MomentTable({
  moments,
  kind,
}: {
  readonly moments: readonly MoveMoment[];
  readonly kind: AxisKind;
}) {
  const speed = kind === "rotary" ? "rad/s" : "m/s";
  const thin = Math.max(1, Math.ceil(moments.length / ROWS));
  return (
    <details>
      <summary>The same numbers as a table</summary>
      <Table caption="Lag, speed and current over the move">
        <thead>
          <tr>
            <Head number>Time</Head>
            <Head number>Commanded</Head>
            <Head number>Real, lowest</Head>
            <Head number>Real, highest</Head>
            <Head number>Lag, full steps</Head>
            <Head number>Highest phase current</Head>
          </tr>
        </thead>
        <tbody>
          {moments
            .filter((_, index) => index % thin === 0)
            .map((moment) => (
              <tr key={moment.time}>
                <NumberCell>
                  <Quantity value={moment.time} unit="s" />
                </NumberCell>
                <NumberCell>
                  <Quantity value={moment.commandedSpeed} unit={speed} />
                </NumberCell>
                <NumberCell>
                  <Quantity value={moment.speed.low} unit={speed} />
                </NumberCell>
                <NumberCell>
                  <Quantity value={moment.speed.high} unit={speed} />
                </NumberCell>
                <NumberCell>{fromTo(moment.lag)}</NumberCell>
                <NumberCell>
                  <Quantity value={moment.current} unit="A" />
                </NumberCell>
              </tr>
            ))}
        </tbody>
      </Table>
    </details>
  );
}
