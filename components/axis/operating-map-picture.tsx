"use client";

import { Plot, type PlotReading, type PlotSpace } from "@/components/charts/plot";
import {
  type KeyItem,
  PlotBeyond,
  PlotKey,
  PlotLine,
  PlotPoint,
  PlotUpright,
} from "@/components/charts/plot-marks";
import { PlotNumbers } from "@/components/charts/plot-numbers";
import { axisTitle } from "@/components/findings/axis-title";
import { LevelMark } from "@/components/ui/level-mark";
import { Quantity } from "@/components/ui/quantity";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { showText } from "@/lib/domain/units";
import type { NoSide, OperatingMap, OperatingPoint, OperatingSide } from "@/lib/review/operating-map";
import { NoPicture } from "./no-picture";
import { axisUnits, percent, scaleOf, someOf } from "./picture-words";

type Units = ReturnType<typeof axisUnits>;

interface Sides {
  readonly map: OperatingMap;
  readonly was: OperatingSide | null;
  readonly toBe: OperatingSide;
}

/** Speed × acceleration of an axis: beyond the hatched boundary the policy's torque margin is lost. */
export function OperatingMapPicture({ map }: { readonly map: OperatingMap }) {
  const was = known(map.was);
  const { toBe } = map;
  if (!toBe.ok) return <NoPicture sentence={toBe.sentence} />;
  const sides = { map, was, toBe };
  const units = axisUnits(map.kind);
  return (
    <>
      <PointWords side={toBe} units={units} />
      {map.was && !map.was.ok && <p className="quiet">Before the change: {map.was.sentence}</p>}
      <Plot
        label={`Speed on the operating map of the ${axisTitle(map.axis)}`}
        x={scaleOf("Speed", units.speed, map.speedEnd)}
        y={scaleOf("Acceleration", units.acceleration, map.accelerationEnd)}
        places={map.speeds}
        read={(index) => readingsAt(sides, units, index)}
        legend={<PlotKey items={keyOf(sides)} />}
      >
        {(space) => <Marks {...sides} space={space} />}
      </Plot>
      <Numbers {...sides} units={units} />
    </>
  );
}

function known(side: OperatingSide | NoSide | null): OperatingSide | null {
  return side?.ok ? side : null;
}

function PointWords({ side, units }: { readonly side: OperatingSide; readonly units: Units }) {
  const { point, pointMissing } = side;
  if (!point) return <NoPicture sentence={pointMissing} />;
  return (
    <p>
      <LevelMark level={point.level} /> At <Quantity value={point.speed} unit={units.speed} /> and{" "}
      <Quantity value={point.acceleration} unit={units.acceleration} />{" "}
      {point.margin === null
        ? "nothing is required of the motors."
        : `each motor keeps a torque margin of ${percent(point.margin)}, where ${percent(point.wanted)} are wanted.`}
      {travelWords(side, point, units)}
    </p>
  );
}

function travelWords({ travel }: OperatingSide, point: OperatingPoint, units: Units): string {
  if (travel === null || point.speed >= point.setSpeed) return "";
  return ` The text sets ${showText(point.setSpeed, units.speed)}, which the travel of ${showText(travel, units.length)} is too short for.`;
}

function Marks({ map, was, toBe, space }: Sides & { readonly space: PlotSpace }) {
  const curve = { space, xs: map.speeds };
  return (
    <>
      <PlotBeyond {...curve} ys={toBe.boundary} />
      <PlotLine {...curve} ys={toBe.pullOut} kind="fine" />
      {toBe.travel !== null && <PlotLine {...curve} ys={reached(map, toBe.travel)} kind="second" />}
      {was && <PlotLine {...curve} ys={was.boundary} kind="was" />}
      <PlotLine {...curve} ys={toBe.boundary} kind="limit" />
      <PlotUpright space={space} x={toBe.limitSpeed} label="voltage limit" />
      {was?.point && <PlotPoint space={space} x={was.point.speed} y={was.point.acceleration} kind="was" />}
      {toBe.point && (
        <PlotPoint space={space} x={toBe.point.speed} y={toBe.point.acceleration} kind="to-be" />
      )}
    </>
  );
}

/** Least acceleration that reaches each speed within the travel, from rest to rest. */
function reached({ speeds, accelerationEnd }: OperatingMap, travel: number): (number | null)[] {
  return speeds.map((speed) => (speed ** 2 / travel <= accelerationEnd ? speed ** 2 / travel : null));
}

function keyOf({ was, toBe }: Sides): KeyItem[] {
  const { marginBelow, marginAbove } = toBe;
  const margins =
    marginBelow === marginAbove
      ? percent(marginBelow)
      : `${percent(marginBelow)}, above the voltage-limit speed ${percent(marginAbove)}`;
  return [
    { mark: "limit", words: `boundary at the policy's torque margin of ${margins}` },
    { mark: "beyond", words: "over limit" },
    { mark: "fine", words: "pull-out, no margin left; the voltage-limit speed" },
    ...(toBe.travel === null
      ? []
      : [{ mark: "second" as const, words: "least acceleration that reaches the speed within the travel" }]),
    ...(was ? [{ mark: "was" as const, words: "boundary before" }] : []),
    ...(was?.point ? [{ mark: "was-point" as const, words: "was" }] : []),
    ...(toBe.point ? [{ mark: "to-be-point" as const, words: was ? "to be" : "as the text sets it" }] : []),
  ];
}

function readingsAt({ map, was, toBe }: Sides, units: Units, index: number): PlotReading[] {
  const acceleration = (values: readonly number[]) => highestWords(values[index] ?? 0, units);
  return [
    { label: "at", value: showText(map.speeds[index] ?? 0, units.speed) },
    { label: "highest acceleration with margin", value: acceleration(toBe.boundary) },
    ...(was ? [{ label: "before", value: acceleration(was.boundary) }] : []),
    { label: "pull-out", value: acceleration(toBe.pullOut) },
  ];
}

function highestWords(value: number, units: Units): string {
  return value === Number.MAX_VALUE ? "any" : showText(value, units.acceleration);
}

/** The same numbers as text, for reading aloud and for copying. */
function Numbers({ map, was, toBe, units }: Sides & { readonly units: Units }) {
  const cell = (value: number | undefined) => (
    <NumberCell>
      {value === Number.MAX_VALUE ? "any" : <Quantity value={value ?? null} unit={units.acceleration} />}
    </NumberCell>
  );
  return (
    <PlotNumbers summary="The numbers of this map">
      {() => (
        <Table caption={`Operating map of the ${axisTitle(map.axis)}`}>
          <thead>
            <tr>
              <Head number>Speed</Head>
              {was && <Head number>Highest acceleration before</Head>}
              <Head number>Highest acceleration with margin</Head>
              <Head number>Pull-out, no margin</Head>
            </tr>
          </thead>
          <tbody>
            {someOf(map.speeds.length, 16).map((index) => (
              <tr key={index}>
                <NumberCell>
                  <Quantity value={map.speeds[index] ?? null} unit={units.speed} />
                </NumberCell>
                {was && cell(was.boundary[index])}
                {cell(toBe.boundary[index])}
                {cell(toBe.pullOut[index])}
              </tr>
            ))}
          </tbody>
        </Table>
      )}
    </PlotNumbers>
  );
}
