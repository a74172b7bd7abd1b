"use client";

import { useMemo, useState } from "react";
import { formatNumber } from "@/lib/domain/units";
import { steadyFromRecord, type SteadyForecast } from "@/lib/physics/heating-record";
import { readTypedNumber } from "@/lib/schemas/typed-number";
import { FieldGroup, SelectField, TextArea, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { SheetSection } from "@/components/ui/sheet";
import { heatRecordOf } from "./heat-record-lines";
import type { AxisBasis } from "./types";

type Place = "case" | "winding";

/** Kelvin that the checks keep below a mount's softening and a winding's limit. */
const RESERVE = 10;

/** What a place may reach, °C, as the checks have it; null where the catalog does not say. */
function limitOf({ assembly, axis }: AxisBasis, place: Place): number | null {
  const hardware = assembly.axes.find((known) => known.axis === axis);
  const most = place === "case" ? hardware?.mount?.softening_c : hardware?.motor?.winding_limit_c;
  return most === undefined ? null : most - RESERVE;
}

const REFUSED: Record<Extract<SteadyForecast, { ok: false }>["because"], string> = {
  too_few: "At least three readings at different times are needed.",
  too_short:
    "The record is too short against the time constant that it shows: go on until it spans at least 0.7 of it.",
  too_straight:
    "The curve does not bend clearly enough beyond the sensor's noise: go on recording, or use a steadier sensor.",
};

/** The temperature at which a motor will settle, from the first readings of its warming up. */
export function HeatingForecast({ basis }: { readonly basis: AxisBasis }) {
  const [place, setPlace] = useState<Place>("case");
  const [typed, setTyped] = useState("");
  const [typedNoise, setTypedNoise] = useState("0.5");
  const record = useMemo(() => heatRecordOf(typed), [typed]);
  const noise = readTypedNumber(typedNoise);
  const known = noise.ok && noise.value !== undefined && noise.value > 0 ? noise.value : null;
  return (
    <SheetSection
      title="Settled temperature from a short record"
      id="heating-forecast"
      note="while it warms up"
    >
      <FieldGroup
        legend="Heating record"
        help="Standing on run current, in still air, from cold. A record of the case says nothing of the winding."
      >
        <SelectField
          label="Where"
          value={place}
          onChange={(event) => setPlace(event.target.value === "winding" ? "winding" : "case")}
        >
          <option value="case">motor case</option>
          <option value="winding">winding</option>
        </SelectField>
        <TextField
          label="Noise of the sensor"
          unit="K"
          inputMode="decimal"
          value={typedNoise}
          error={known === null ? "Type a number of more than 0 K." : undefined}
          onChange={(event) => setTypedNoise(event.target.value)}
        />
        <TextArea
          code
          label="Readings"
          help="One a line: minutes, then °C."
          value={typed}
          error={record.ok ? undefined : record.sentence}
          onChange={(event) => setTyped(event.target.value)}
        />
      </FieldGroup>
      {record.ok && record.readings.length > 0 && known !== null && (
        <Forecast found={steadyFromRecord(record.readings, known)} limit={limitOf(basis, place)} />
      )}
      <p className="sheet-section-note">
        Hot surface: read with a probe, and let the motor cool before hands go there.
      </p>
    </SheetSection>
  );
}

function Forecast({ found, limit }: { readonly found: SteadyForecast; readonly limit: number | null }) {
  if (!found.ok)
    return (
      <Notice level="cannot">
        <p>{REFUSED[found.because]}</p>
      </Notice>
    );
  const celsius = (value: number) => `${formatNumber(value, 3)} °C`;
  const level =
    limit === null ? undefined : found.settled > limit ? "over" : found.high > limit ? "near" : "within";
  return (
    <Notice level={level} live="status">
      <p>
        It will settle at {celsius(found.settled)}, between {celsius(found.low)} and {celsius(found.high)}{" "}
        with 95 % confidence; time constant {formatNumber(found.timeConstant / 60, 2)} min, scatter{" "}
        {formatNumber(found.scatter, 2)} K about the curve.
        {limit === null
          ? " What it may reach is not known: the catalog does not say."
          : ` At most ${celsius(limit)} are allowed there.`}
      </p>
    </Notice>
  );
}
