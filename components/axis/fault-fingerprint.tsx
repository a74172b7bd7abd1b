"use client";

import { useMemo, useState } from "react";
import { needWords } from "@/lib/domain/need-words";
import { joinWords } from "@/lib/domain/sentences";
import { faultFingerprint, type Fingerprint, type HeatMeasurement } from "@/lib/physics/fingerprint";
import { CATALOG_SPREAD } from "@/lib/physics/thermal-fit";
import { mapFiles, parseFile } from "@/lib/review/check";
import { withoutRefined } from "@/lib/review/refined-assembly";
import { heatModel, type HeatModel } from "@/lib/rules/heat-model";
import { readTypedNumber } from "@/lib/schemas/typed-number";
import { Button } from "@/components/ui/button";
import { FieldGroup, SelectField, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { Quantity } from "@/components/ui/quantity";
import { SheetSection } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import { EXPLANATION_WORDS, factorWords, TELLING_WORDS } from "./explanation-words";
import type { AxisBasis } from "./types";
import { useMeasuredHeat } from "./use-measured-heat";

interface TypedHeat {
  readonly place: HeatMeasurement["place"];
  readonly celsius: string;
  readonly ambient: string;
}

const NOTHING: TypedHeat = { place: "case", celsius: "", ambient: "" };

/** The motor's heat as the catalog has it: what was refined by measurements would explain them away. */
function catalogHeat({ files, keyTable, policy, axis, ...basis }: AxisBasis) {
  const assembly = withoutRefined(basis.assembly);
  const { parameters } = mapFiles(files.map(parseFile), { keyTable, assembly });
  return heatModel({ parameters, assembly, policy }, axis);
}

function measurementOf({ place, celsius, ambient }: TypedHeat): HeatMeasurement | null {
  const [measured, air] = [readTypedNumber(celsius), readTypedNumber(ambient)];
  if (!measured.ok || !air.ok || typeof measured.value !== "number" || typeof air.value !== "number")
    return null;
  return { place, celsius: measured.value, ambient: air.value };
}

/** Holds a measured temperature against what single faults would give, with odds and the measurement that tells most. */
export function FaultFingerprint({ basis }: { readonly basis: AxisBasis }) {
  const heat = useMemo(() => catalogHeat(basis), [basis]);
  return (
    <SheetSection
      title="Fault fingerprint"
      id="fault-fingerprint"
      note="a motor warmer or cooler than predicted"
    >
      {heat.ok && heat.value.windingResistance !== null ? (
        <Weighing basis={basis} model={heat.value} winding={heat.value.windingResistance} />
      ) : (
        <Notice level="cannot">
          <p>
            Missing:{" "}
            {joinWords(
              (heat.ok ? [`axes.${basis.axis}.motor.winding_to_ambient_k_per_w`] : heat.needs).map(
                (path) => needWords(path).words,
              ),
            )}
            .
          </p>
        </Notice>
      )}
    </SheetSection>
  );
}

interface WeighingProps {
  readonly basis: AxisBasis;
  readonly model: HeatModel;
  /** K/W, winding to ambient. */
  readonly winding: number;
}

function Weighing({ basis, model, winding }: WeighingProps) {
  const [rows, setRows] = useState<readonly TypedHeat[]>([NOTHING]);
  const { current, holdCurrent, resistanceAt20, caseResistance } = model;
  const measured = rows.flatMap(
    (row) => measurementOf(caseResistance === null ? { ...row, place: "winding" } : row) ?? [],
  );
  const put = (at: number, part: Partial<TypedHeat>): void =>
    setRows(rows.map((row, index) => (index === at ? { ...row, ...part } : row)));
  const found =
    measured.length === 0
      ? null
      : faultFingerprint(
          {
            current,
            holdCurrent,
            resistanceAt20,
            windingResistance: winding,
            caseResistance,
            spread: CATALOG_SPREAD,
          },
          measured,
        );
  return (
    <>
      {rows.map((row, index) => (
        <HeatFields
          key={index}
          row={row}
          number={index + 1}
          withCase={caseResistance !== null}
          put={(part) => put(index, part)}
        />
      ))}
      <div className="acts">
        <Button onClick={() => setRows([...rows, { ...NOTHING, place: "winding" }])}>
          Add a temperature
        </Button>
        <FromVerification basis={basis} onTaken={setRows} />
      </div>
      {holdCurrent === null && (
        <p className="quiet">
          The hold current is not known: that the motor stood on it cannot be weighed as an explanation.
        </p>
      )}
      {found ? (
        <Found found={found} />
      ) : (
        <p className="quiet">
          Type the temperature of the settled motor and of the air around it, standing on run current.
        </p>
      )}
    </>
  );
}

interface HeatFieldsProps {
  readonly row: TypedHeat;
  readonly number: number;
  readonly withCase: boolean;
  readonly put: (part: Partial<TypedHeat>) => void;
}

function HeatFields({ row, number, withCase, put }: HeatFieldsProps) {
  const wrong = (typed: string): string | undefined => {
    const read = readTypedNumber(typed);
    return read.ok ? undefined : read.sentence;
  };
  return (
    <FieldGroup legend={`Measured temperature ${number}`}>
      <SelectField
        label="Where"
        value={withCase ? row.place : "winding"}
        onChange={(event) => put({ place: event.target.value === "winding" ? "winding" : "case" })}
      >
        {withCase && <option value="case">motor case</option>}
        <option value="winding">winding</option>
      </SelectField>
      <TextField
        label="Measured"
        unit="°C"
        help="Standing on run current, settled"
        inputMode="decimal"
        value={row.celsius}
        error={wrong(row.celsius)}
        onChange={(event) => put({ celsius: event.target.value })}
      />
      <TextField
        label="Air around the motor"
        unit="°C"
        inputMode="decimal"
        value={row.ambient}
        error={wrong(row.ambient)}
        onChange={(event) => put({ ambient: event.target.value })}
      />
    </FieldGroup>
  );
}

interface FromVerificationProps {
  readonly basis: AxisBasis;
  readonly onTaken: (rows: readonly TypedHeat[]) => void;
}

/** Takes over what the newest verification measured on this axis. */
function FromVerification({ basis, onTaken }: FromVerificationProps) {
  const { data } = useMeasuredHeat(basis.machineId);
  const own = (data?.readings ?? []).filter(
    ({ axis, place, ambientC, sameMotor }) =>
      axis?.toLowerCase() === basis.axis.toLowerCase() &&
      (place === "case" || place === "winding") &&
      ambientC !== null &&
      sameMotor,
  );
  const newest = own.filter(({ verificationId }) => verificationId === own[0]?.verificationId);
  if (newest.length === 0) return null;
  const take = (): void =>
    onTaken(
      newest.map(({ place, celsius, ambientC }) => ({
        place: place === "winding" ? "winding" : "case",
        celsius: String(celsius),
        ambient: String(ambientC),
      })),
    );
  return <Button onClick={take}>Take those of the newest verification</Button>;
}

function Found({ found: { explanations, telling } }: { readonly found: Fingerprint }) {
  const [best] = explanations;
  return (
    <>
      {best && (
        <p aria-live="polite">
          Fits best: <strong>{EXPLANATION_WORDS[best.explanation]}</strong>, odds{" "}
          {Math.round(best.odds * 100)} %.
        </p>
      )}
      <Table caption="Explanations, the likeliest first">
        <thead>
          <tr>
            <Head>Explanation</Head>
            <Head number>Odds</Head>
            <Head>Where it fits best</Head>
            {telling && <Head number>Next reading would be</Head>}
          </tr>
        </thead>
        <tbody>
          {explanations.map(({ explanation, odds, factor }) => (
            <tr key={explanation}>
              <th scope="row">{EXPLANATION_WORDS[explanation]}</th>
              <NumberCell>{`${odds < 0.005 ? "< 1" : Math.round(odds * 100)}\u00a0%`}</NumberCell>
              <td>{factorWords(explanation, factor)}</td>
              {telling && <Awaited telling={telling} explanation={explanation} />}
            </tr>
          ))}
        </tbody>
      </Table>
      {telling && <p>To tell them apart: {TELLING_WORDS[telling.measurement].act}</p>}
      <p className="quiet">
        Each explanation is taken as equally likely beforehand and as the only fault. The catalog&apos;s
        thermal resistances are taken as good to 30 %, a probe to 2.2 K. Odds are no proof; the next reading
        is.
      </p>
    </>
  );
}

interface AwaitedProps {
  readonly telling: NonNullable<Fingerprint["telling"]>;
  readonly explanation: Fingerprint["explanations"][number]["explanation"];
}

function Awaited({ telling, explanation }: AwaitedProps) {
  const own = telling.expected.find((one) => one.explanation === explanation);
  const { unit } = TELLING_WORDS[telling.measurement];
  return (
    <NumberCell>
      <Quantity value={own?.mean ?? null} unit={unit} />
      {own && (
        <>
          {" "}
          <Quantity value={own.deviation} unit={unit} sign="±" digits={2} />
        </>
      )}
    </NumberCell>
  );
}
