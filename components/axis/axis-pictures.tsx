"use client";

import { useMemo, useState } from "react";
import { FieldGroup, TextField } from "@/components/ui/field";
import { SheetSection } from "@/components/ui/sheet";
import { Button } from "@/components/ui/button";
import { parameterLabel } from "@/lib/domain/parameters";
import { formatNumber, shownUnit } from "@/lib/domain/units";
import type {
  AxisPictures as Pictures,
  AxisPicturesRequest,
  Tried,
  TriedNow,
} from "@/lib/review/axis-pictures";
import { readTypedNumber } from "@/lib/schemas/typed-number";
import { OperatingMapPicture } from "./operating-map-picture";
import { TemperatureRisePicture } from "./temperature-rise-picture";
import { TorqueCurvePicture } from "./torque-curve-picture";
import type { AxisBasis } from "./types";
import { usePictures } from "./use-pictures";

type TypedNumbers = Readonly<Partial<Record<Tried, string>>>;

interface TypedDuty {
  /** % */
  readonly share: string;
  /** min; empty for five time constants. */
  readonly minutes: string;
}

const MINUTE = 60;

/** A number that was typed, or undefined where there is none that can be used; the sentence says why. */
function usable(typed: string | undefined, fits: (value: number) => boolean, wanted: string) {
  const read = readTypedNumber(typed ?? "");
  if (!read.ok) return { value: undefined, error: read.sentence };
  if (read.value !== undefined && !fits(read.value)) return { value: undefined, error: wanted };
  return { value: read.value, error: undefined };
}

const positive = (typed: string | undefined) => usable(typed, (value) => value > 0, "More than 0.");
const shareOf = (typed: string) => usable(typed, (value) => value >= 0 && value <= 100, "From 0 to 100 %.");

function triedIn(typed: TypedNumbers, now: readonly TriedNow[]): AxisPicturesRequest["tried"] {
  return Object.fromEntries(
    now.flatMap(({ parameter, unit }) => {
      const { value } = positive(typed[parameter]);
      return value === undefined ? [] : [[parameter, value / shownUnit(unit).factor]];
    }),
  );
}

/** Operating map, torque curve and temperatures of an axis, redrawn while other numbers are tried. */
export function AxisPictures({ basis }: { readonly basis: AxisBasis }) {
  const [typed, setTyped] = useState<TypedNumbers>({});
  const [duty, setDuty] = useState<TypedDuty>({ share: "100", minutes: "" });
  const [now, setNow] = useState<readonly TriedNow[]>([]);
  const question = useMemo(() => questionOf({ basis, typed, duty, now }), [basis, typed, duty, now]);
  const pictures = usePictures(question);
  // What the text says does not change while numbers are tried.
  if (pictures && now.length === 0 && pictures.now.length > 0) setNow(pictures.now);
  if (basis.files.length === 0)
    return (
      <SheetSection title="Operating map" id="operating-map">
        <p>No baseline has been released to this machine: there are no numbers of this axis to draw.</p>
      </SheetSection>
    );
  if (!pictures) return <p className="quiet">Reckoning the pictures of this axis …</p>;
  return (
    <>
      <SheetSection title="Operating map" id="operating-map" note="speed and acceleration against torque">
        <TryNumbers now={now} typed={typed} onChange={setTyped} />
        <OperatingMapPicture map={pictures.map} />
      </SheetSection>
      <SheetSection title="Torque curve" id="torque-curve" note="what each motor can give and is asked">
        <TorqueCurvePicture curve={pictures.torque} />
      </SheetSection>
      <SheetSection title="Temperature rise" id="temperature-rise" note="from a cold start">
        <DutyFields duty={duty} onChange={setDuty} />
        <HeatNote pictures={pictures} />
        <TemperatureRisePicture course={pictures.heat} />
      </SheetSection>
    </>
  );
}

function questionOf(input: {
  readonly basis: AxisBasis;
  readonly typed: TypedNumbers;
  readonly duty: TypedDuty;
  readonly now: readonly TriedNow[];
}): Omit<AxisPicturesRequest, "id"> {
  const { basis, typed, duty, now } = input;
  const { files, keyTable, assembly, policy, axis } = basis;
  const { value: share = 100 } = shareOf(duty.share);
  const { value: span } = positive(duty.minutes);
  return {
    kind: "axis",
    axis,
    texts: { files, keyTable, assembly, policy },
    tried: triedIn(typed, now),
    duty: { share: share / 100, span: span === undefined ? null : span * MINUTE },
  };
}

interface TryNumbersProps {
  readonly now: readonly TriedNow[];
  readonly typed: TypedNumbers;
  readonly onChange: (typed: TypedNumbers) => void;
}

/** Other numbers than the text's, for the eye only: nothing is written. */
function TryNumbers({ now, typed, onChange }: TryNumbersProps) {
  if (now.length === 0) return null;
  return (
    <FieldGroup
      legend="Try other numbers"
      help="All three pictures show them beside what the required text says. Nothing is written."
    >
      {now.map(({ parameter, value, unit, basis }) => {
        const shown = shownUnit(unit);
        return (
          <TextField
            key={parameter}
            label={parameterLabel(parameter)}
            unit={[shown.unit, basis].filter(Boolean).join(" ")}
            help={`${formatNumber(value * shown.factor, 6)} in the text`}
            inputMode="decimal"
            autoComplete="off"
            value={typed[parameter] ?? ""}
            error={positive(typed[parameter]).error}
            onChange={({ target }) => onChange({ ...typed, [parameter]: target.value })}
          />
        );
      })}
      {Object.values(typed).some((words) => words !== "") && (
        <p>
          <Button variant="quiet" onClick={() => onChange({})}>
            back to the text
          </Button>
        </p>
      )}
    </FieldGroup>
  );
}

interface DutyFieldsProps {
  readonly duty: TypedDuty;
  readonly onChange: (duty: TypedDuty) => void;
}

function DutyFields({ duty, onChange }: DutyFieldsProps) {
  return (
    <FieldGroup legend="Duty cycle" help="The rest of the time the axis stands on its hold current.">
      <TextField
        label="Share of the time on run current"
        unit="%"
        inputMode="decimal"
        autoComplete="off"
        value={duty.share}
        error={shareOf(duty.share).error}
        onChange={({ target }) => onChange({ ...duty, share: target.value })}
      />
      <TextField
        label="Time shown"
        unit="min"
        help="Empty: five thermal time constants"
        inputMode="decimal"
        autoComplete="off"
        value={duty.minutes}
        error={positive(duty.minutes).error}
        onChange={({ target }) => onChange({ ...duty, minutes: target.value })}
      />
    </FieldGroup>
  );
}

/** What the temperatures rest on. */
function HeatNote({ pictures: { heat } }: { readonly pictures: Pictures }) {
  if (!heat.toBe.ok) return null;
  const { current, ambient } = heat.toBe;
  const cycle =
    heat.timeConstant === null
      ? ""
      : ` Holds for cycles much shorter than the time constant of ${formatNumber(heat.timeConstant / MINUTE)} min.`;
  return (
    <p className="quiet">
      Copper loss of {formatNumber(current)} A rms in each winding, air at {formatNumber(ambient)} °C. Iron
      loss, which a turning motor adds, is in no data sheet and is left out.{cycle}
    </p>
  );
}
