"use client";

import { plural } from "@/lib/domain/sentences";
import type { MeasuredHeatView } from "@/lib/schemas/measured-heat";
import { Refusal } from "@/components/forms/refusal";
import { DateTime } from "@/components/ui/date-time";
import { Empty } from "@/components/ui/empty";
import { Loading } from "@/components/ui/loading";
import { Quantity } from "@/components/ui/quantity";
import { SheetSection } from "@/components/ui/sheet";
import { Head, NumberCell, Table } from "@/components/ui/table";
import type { AxisBasis } from "./types";
import { useMeasuredHeat } from "./use-measured-heat";

const PLACE_WORDS = { case: "motor case", winding: "winding", driver: "driver", mount: "mount" } as const;
const FIELD_WORDS = {
  winding_to_ambient_k_per_w: "Thermal resistance, winding to ambient",
  case_to_ambient_k_per_w: "Thermal resistance, case to ambient",
} as const;
const REFUSED = {
  too_few: "Not refined: it takes two temperatures of a motor that had settled.",
  contradictory:
    "Not refined: the temperatures and the catalog contradict each other. Find out which is wrong; measure again with the motor settled.",
  far_from_catalog:
    "Not refined, the catalog value is kept: the temperatures would move it by more than 60 %. See whether the motor stood on run current, not on hold current, and had settled.",
} as const;

type Reading = MeasuredHeatView["readings"][number];
type Fit = MeasuredHeatView["fits"][number];

/** Temperatures measured on this axis against the predicted ones, and the thermal resistance that they refine. */
export function MeasuredPredicted({ basis }: { readonly basis: AxisBasis }) {
  const heat = useMeasuredHeat(basis.machineId);
  const isOwn = ({ axis }: { readonly axis: string | null }): boolean =>
    axis?.toLowerCase() === basis.axis.toLowerCase();
  return (
    <SheetSection title="Measured against predicted" id="measured-predicted">
      {heat.isPending && <Loading>Looking through the verifications.</Loading>}
      {heat.error && <Refusal error={heat.error} title="Not shown" />}
      {heat.data && <Shown readings={heat.data.readings.filter(isOwn)} fits={heat.data.fits.filter(isOwn)} />}
    </SheetSection>
  );
}

function Shown({ readings, fits }: { readonly readings: readonly Reading[]; readonly fits: readonly Fit[] }) {
  if (readings.length === 0)
    return (
      <Empty>
        No temperature of this axis has been measured. Record the case or the winding, and the ambient beside
        it, with the next verification, once the motor has settled on its run current.
      </Empty>
    );
  return (
    <>
      {fits.length > 0 && <Fits fits={fits} />}
      <Readings readings={readings} />
      <p className="quiet">
        Each temperature is taken as settled, standing on run current. The catalog value counts as one more
        measurement, good to 30 %; a probe is taken as good to 2 K, the air thermometer to 1 K, the current to
        5 %.
      </p>
    </>
  );
}

function Fits({ fits }: { readonly fits: readonly Fit[] }) {
  return (
    <Table caption="What they make of the thermal data">
      <thead>
        <tr>
          <Head>Quantity</Head>
          <Head number>Catalog</Head>
          <Head number>Refined</Head>
          <Head number>95 % interval</Head>
          <Head>Rests on</Head>
        </tr>
      </thead>
      <tbody>
        {fits.map(({ field, catalog, readings, fit }) => (
          <tr key={field}>
            <th scope="row">{FIELD_WORDS[field]}</th>
            <NumberCell>
              <Quantity value={catalog} unit="K/W" />
            </NumberCell>
            <NumberCell>
              <Quantity value={fit.ok ? fit.value : null} unit="K/W" />
            </NumberCell>
            <NumberCell>
              {fit.ok && (
                <>
                  <Quantity value={fit.low} unit="K/W" /> to <Quantity value={fit.high} unit="K/W" />
                </>
              )}
            </NumberCell>
            <td>
              {fit.ok
                ? `${plural(readings, "temperature")}, with ${Math.round(fit.weight * 100)} % of the weight; the checks use the upper end of the interval`
                : REFUSED[fit.because]}
            </td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function Readings({ readings }: { readonly readings: readonly Reading[] }) {
  return (
    <Table caption="Measured temperatures, the newest first">
      <thead>
        <tr>
          <Head>When</Head>
          <Head>Where</Head>
          <Head number>Measured</Head>
          <Head number>By the catalog</Head>
          <Head number>Ambient</Head>
          <Head number>Loss</Head>
          <Head>Used</Head>
        </tr>
      </thead>
      <tbody>
        {readings.map(
          ({ verificationId, at, place, celsius, predicted, ambientC, power, ignored }, index) => (
            <tr key={`${verificationId} ${index}`}>
              <th scope="row">
                <DateTime value={at} />
              </th>
              <td>{PLACE_WORDS[place]}</td>
              <NumberCell>
                <Quantity value={celsius} unit="°C" />
              </NumberCell>
              <NumberCell>
                <Quantity value={predicted} unit="°C" />
              </NumberCell>
              <NumberCell>
                <Quantity value={ambientC} unit="°C" />
              </NumberCell>
              <NumberCell>
                <Quantity value={power} unit="W" />
              </NumberCell>
              <td>{ignored ?? "yes"}</td>
            </tr>
          ),
        )}
      </tbody>
    </Table>
  );
}
