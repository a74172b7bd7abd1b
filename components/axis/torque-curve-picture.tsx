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
import type { TorqueCurve, TorqueSide } from "@/lib/review/torque-curve";
import { NoPicture } from "./no-picture";
import { axisUnits, percent, scaleOf, someOf } from "./picture-words";

type Units = ReturnType<typeof axisUnits>;

interface Sides {
  readonly curve: TorqueCurve;
  readonly was: TorqueSide | null;
  readonly toBe: TorqueSide;
}

const TORQUE = "N·m";

/** What each motor can give over speed, and what the ramp asks of it. */
export function TorqueCurvePicture({ curve }: { readonly curve: TorqueCurve }) {
  const { toBe } = curve;
  if (!toBe.ok) return <NoPicture sentence={toBe.sentence} />;
  const sides = { curve, was: curve.was?.ok ? curve.was : null, toBe };
  const units = axisUnits(curve.kind);
  return (
    <>
      <RampWords side={toBe} units={units} />
      <Plot
        label={`Speed on the torque curve of the ${axisTitle(curve.axis)}`}
        x={scaleOf("Speed", units.speed, curve.speedEnd)}
        y={scaleOf("Torque of each motor", TORQUE, curve.torqueEnd)}
        places={curve.speeds}
        read={(index) => readingsAt(sides, units, index)}
        legend={<PlotKey items={keyOf(sides)} />}
      >
        {(space) => <Marks {...sides} space={space} />}
      </Plot>
      <Numbers {...sides} units={units} />
    </>
  );
}

function RampWords({ side, units }: { readonly side: TorqueSide; readonly units: Units }) {
  const { weakest, rampMissing, peak } = side;
  if (rampMissing !== "") return <NoPicture sentence={rampMissing} />;
  if (!weakest || peak === null) return <p>Nothing is required of the motors.</p>;
  const { margin, wanted } = weakest;
  return (
    <p>
      <LevelMark level={weakest.level} /> On the ramp from rest to{" "}
      <Quantity value={peak} unit={units.speed} /> each motor has least to spare at{" "}
      <Quantity value={weakest.speed} unit={units.speed} />: it can give{" "}
      <Quantity value={weakest.available} unit={TORQUE} /> and needs{" "}
      <Quantity value={weakest.required} unit={TORQUE} />, a margin of {percent(margin)} where{" "}
      {percent(wanted)} are wanted.
    </p>
  );
}

/** Where the ramp of a side ends: its peak speed and the torque there. */
function rampEnd({ speeds }: TorqueCurve, side: TorqueSide): { x: number; y: number } | null {
  const last = side.required.findLastIndex((value) => value !== null);
  const y = side.required[last] ?? null;
  return y === null ? null : { x: speeds[last] ?? 0, y };
}

function Marks({ curve, was, toBe, space }: Sides & { readonly space: PlotSpace }) {
  const line = { space, xs: curve.speeds };
  const ends = { was: was && rampEnd(curve, was), toBe: rampEnd(curve, toBe) };
  return (
    <>
      <PlotBeyond {...line} ys={toBe.allowed} />
      <PlotLine {...line} ys={toBe.expected} kind="second" />
      <PlotLine {...line} ys={toBe.available} kind="to-be" />
      <PlotLine {...line} ys={toBe.allowed} kind="limit" />
      {was && <PlotLine {...line} ys={was.available} kind="was" />}
      {was && <PlotLine {...line} ys={was.required} kind="was" />}
      <PlotLine {...line} ys={curve.speeds.map(() => toBe.load)} kind="fine" />
      <PlotLine {...line} ys={toBe.required} kind="load" />
      <PlotUpright space={space} x={toBe.limitSpeed} label="voltage limit" />
      {ends.was && <PlotPoint space={space} {...ends.was} kind="was" />}
      {ends.toBe && <PlotPoint space={space} {...ends.toBe} kind="to-be" />}
    </>
  );
}

function keyOf({ was, toBe }: Sides): KeyItem[] {
  return [
    { mark: "to-be", words: "pull-out torque, conservative: it decides" },
    { mark: "second", words: "pull-out torque as expected, for the eye only" },
    { mark: "limit", words: "what a move may ask with the policy's margin kept" },
    { mark: "beyond", words: "over limit" },
    ...(toBe.required.length === 0
      ? []
      : [
          { mark: "load" as const, words: "what the ramp asks" },
          { mark: "to-be-point" as const, words: "at its highest speed" },
        ]),
    { mark: "fine", words: "load at steady speed; the voltage-limit speed" },
    ...(was ? [{ mark: "was" as const, words: "pull-out torque and ramp before" }] : []),
  ];
}

function readingsAt({ curve, was, toBe }: Sides, units: Units, index: number): PlotReading[] {
  const torque = (value: number | null | undefined) => showText(value ?? 0, TORQUE);
  const required = toBe.required[index] ?? null;
  const available = toBe.available[index] ?? 0;
  return [
    { label: "at", value: showText(curve.speeds[index] ?? 0, units.speed) },
    { label: "conservative", value: torque(available) },
    { label: "expected", value: torque(toBe.expected[index]) },
    { label: "allowed", value: torque(toBe.allowed[index]) },
    ...(required === null
      ? [{ label: "load", value: torque(toBe.load) }]
      : [{ label: "the ramp asks", value: torque(required) }]),
    ...(required === null || required <= 0
      ? []
      : [{ label: "margin", value: percent(available / required - 1) }]),
    ...(was ? [{ label: "conservative before", value: torque(was.available[index]) }] : []),
  ];
}

/** The same numbers as text, for reading aloud and for copying. */
function Numbers({ curve, was, toBe, units }: Sides & { readonly units: Units }) {
  const cell = (value: number | null | undefined) => (
    <NumberCell>
      <Quantity value={value ?? null} unit={TORQUE} />
    </NumberCell>
  );
  return (
    <PlotNumbers summary="The numbers of this curve">
      {() => (
        <Table caption={`Torque of each motor of the ${axisTitle(curve.axis)}`}>
          <thead>
            <tr>
              <Head number>Speed</Head>
              {was && <Head number>Conservative before</Head>}
              <Head number>Conservative</Head>
              <Head number>Expected</Head>
              <Head number>Allowed</Head>
              <Head number>The ramp asks</Head>
            </tr>
          </thead>
          <tbody>
            {someOf(curve.speeds.length, 16).map((index) => (
              <tr key={index}>
                <NumberCell>
                  <Quantity value={curve.speeds[index] ?? null} unit={units.speed} />
                </NumberCell>
                {was && cell(was.available[index])}
                {cell(toBe.available[index])}
                {cell(toBe.expected[index])}
                {cell(toBe.allowed[index])}
                {cell(toBe.required[index])}
              </tr>
            ))}
          </tbody>
        </Table>
      )}
    </PlotNumbers>
  );
}
