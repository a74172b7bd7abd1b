"use client";

import { Plot, type PlotAxis, type PlotReading, type PlotSpace } from "@/components/charts/plot";
import {
  type KeyItem,
  type LineKind,
  PlotKey,
  PlotLimit,
  PlotLine,
  PlotName,
} from "@/components/charts/plot-marks";
import { PlotNumbers } from "@/components/charts/plot-numbers";
import { axisTitle } from "@/components/findings/axis-title";
import { LevelMark } from "@/components/ui/level-mark";
import { Quantity } from "@/components/ui/quantity";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { formatNumber } from "@/lib/domain/units";
import type { HeatedCourse, HeatedPart, HeatSide, TemperatureCourse } from "@/lib/review/temperature-course";
import { NoPicture } from "./no-picture";
import { someOf } from "./picture-words";

interface Sides {
  readonly course: TemperatureCourse;
  readonly was: HeatSide | null;
  readonly toBe: HeatSide;
}

const WORDS: Readonly<Record<HeatedPart, string>> = {
  winding: "winding",
  case: "case",
  junction: "driver junction",
};
const LINES: Readonly<Record<HeatedPart, LineKind>> = { winding: "to-be", case: "second", junction: "load" };
const MINUTE = 60;

/** Winding, case and driver junction over time from a cold start. */
export function TemperatureRisePicture({ course }: { readonly course: TemperatureCourse }) {
  const { toBe } = course;
  if (!toBe.ok) return <NoPicture sentence={toBe.sentence} />;
  const sides = { course, was: course.was?.ok ? course.was : null, toBe };
  return (
    <>
      <Settled {...sides} />
      <Plot
        label={`Time on the temperatures of the ${axisTitle(course.axis)}`}
        x={timeScale(course)}
        y={{ title: "Temperature", unit: "°C", factor: 1, start: course.low, end: course.high }}
        places={course.times}
        read={(index) => readingsAt(sides, index)}
        legend={<PlotKey items={keyOf(sides)} />}
      >
        {(space) => <Marks {...sides} space={space} />}
      </Plot>
      <Numbers {...sides} />
    </>
  );
}

function timeScale({ timeEnd }: TemperatureCourse): PlotAxis {
  return { title: "Time from a cold start", unit: "min", factor: 1 / MINUTE, start: 0, end: timeEnd };
}

function minutes(seconds: number): string {
  return `${formatNumber(seconds / MINUTE)} min`;
}

/** °C at a place: of the course, or the settled value where only that is known. */
function valueAt({ temperatures, settled }: HeatedCourse, index: number): number | null {
  return temperatures[index] ?? settled;
}

/** One sentence for each part: where it settles, its limit, and what is not known. */
function Settled({ toBe }: Sides) {
  return (
    <ul>
      {toBe.parts.map((part) => (
        <li key={part.part}>
          <LevelMark level={part.level} /> {capital(WORDS[part.part])}:{" "}
          {part.settled !== null && (
            <>
              settles at <Quantity value={part.settled} unit="°C" />
              {part.limit !== null && (
                <>
                  , at most <Quantity value={part.limit} unit="°C" /> are allowed
                </>
              )}
              {part.passesLimit !== null && `, passed after ${minutes(part.passesLimit)}`}.{" "}
            </>
          )}
          {part.note}
        </li>
      ))}
    </ul>
  );
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}

function Marks({ course, was, toBe, space }: Sides & { readonly space: PlotSpace }) {
  const line = { space, xs: course.times };
  const ys = (part: HeatedCourse) => course.times.map((_, index) => valueAt(part, index));
  // Names of curves that run close together stand one after the other.
  const nameAt = (row: number) => Math.round((course.times.length - 1) * (1 - 0.2 * row));
  return (
    <>
      {toBe.parts.map(
        ({ part, limit }, index) =>
          limit !== null && (
            <PlotLimit
              key={part}
              space={space}
              y={limit}
              label={`limit of the ${LIMITED[part]}`}
              at={0.27 * index}
            />
          ),
      )}
      {was?.parts.map((part) => (
        <PlotLine key={part.part} {...line} ys={ys(part)} kind="was" />
      ))}
      {toBe.parts.map((part, row) => (
        <g key={part.part}>
          <PlotLine {...line} ys={ys(part)} kind={LINES[part.part]} />
          <PlotName
            space={space}
            x={course.times[nameAt(row)] ?? 0}
            y={valueAt(part, nameAt(row)) ?? -1e9}
            name={WORDS[part.part]}
          />
        </g>
      ))}
    </>
  );
}

/** Whose limit it is: the case may be hot, its mount may not. */
const LIMITED: Readonly<Record<HeatedPart, string>> = {
  winding: "winding",
  case: "mount",
  junction: "junction",
};

function keyOf({ was, toBe }: Sides): KeyItem[] {
  const drawn = toBe.parts.filter(({ settled }) => settled !== null);
  return [
    ...drawn.map(({ part, temperatures }) => ({
      mark: LINES[part],
      words: temperatures.length === 0 ? `${WORDS[part]}, settled` : WORDS[part],
    })),
    ...(toBe.parts.some(({ limit }) => limit !== null)
      ? [
          { mark: "limit" as const, words: "limit" },
          { mark: "beyond" as const, words: "over limit" },
        ]
      : []),
    ...(was ? [{ mark: "was" as const, words: "the same parts before" }] : []),
  ];
}

function readingsAt({ course, was, toBe }: Sides, index: number): PlotReading[] {
  const values = (side: HeatSide, behind: string) =>
    side.parts.flatMap((part) => {
      const value = valueAt(part, index);
      return value === null
        ? []
        : [{ label: `${WORDS[part.part]}${behind}`, value: `${formatNumber(value)} °C` }];
    });
  return [
    { label: "after", value: minutes(course.times[index] ?? 0) },
    ...values(toBe, ""),
    ...(was ? values(was, " before") : []),
  ];
}

/** The same numbers as text, for reading aloud and for copying. */
function Numbers({ course, was, toBe }: Sides) {
  const sides = was
    ? [
        { side: was, behind: " before" },
        { side: toBe, behind: "" },
      ]
    : [{ side: toBe, behind: "" }];
  const columns = sides.flatMap(({ side, behind }) =>
    side.parts.filter(({ settled }) => settled !== null).map((part) => ({ part, behind })),
  );
  return (
    <PlotNumbers summary="The numbers of these temperatures">
      {() => (
        <Table caption={`Temperatures of the ${axisTitle(course.axis)}`}>
          <thead>
            <tr>
              <Head number>Time</Head>
              {columns.map(({ part, behind }) => (
                <Head number key={`${part.part}${behind}`}>
                  {capital(WORDS[part.part])}
                  {behind}
                </Head>
              ))}
            </tr>
          </thead>
          <tbody>
            {someOf(course.times.length, 12).map((index) => (
              <tr key={index}>
                <NumberCell>{minutes(course.times[index] ?? 0)}</NumberCell>
                {columns.map(({ part, behind }) => (
                  <NumberCell key={`${part.part}${behind}`}>
                    <Quantity value={valueAt(part, index)} unit="°C" />
                  </NumberCell>
                ))}
              </tr>
            ))}
          </tbody>
        </Table>
      )}
    </PlotNumbers>
  );
}
