import { parameterDefinition, type ParameterName } from "@/lib/domain/parameters";
import { showQuantity } from "@/lib/domain/units";
import type { Basis } from "@/lib/domain/values";

export interface QuantityProps {
  /** In the inside unit (SI; °C; 1/mm); null shows a dash. */
  readonly value: number | null;
  readonly unit: string;
  readonly digits?: number | undefined;
  /** Before the number: "≤", "≥", "+". */
  readonly sign?: string | undefined;
  readonly basis?: Basis | null | undefined;
}

/** A number with its unit, smaller and greyer, never wrapped apart. */
export function Quantity({ value, unit, digits = 3, sign, basis }: QuantityProps) {
  if (value === null) return <NoValue />;
  const shown = showQuantity(value, unit, digits);
  const behind = [shown.unit, basis].filter(Boolean).join(" ");
  return (
    <span className="quantity">
      {sign !== undefined && `${sign}\u00a0`}
      <span className="quantity-number">{shown.number.replace("-", "\u2212")}</span>
      {behind !== "" && <span className="quantity-unit">{`\u00a0${behind}`}</span>}
    </span>
  );
}

export interface ParameterQuantityProps {
  readonly parameter: ParameterName;
  readonly value: number;
  readonly unit: string;
  readonly basis: Basis | null;
}

/** The value of a parameter to six digits, as texts hold it; yes or no for a switch. */
export function ParameterQuantity({ parameter, value, unit, basis }: ParameterQuantityProps) {
  if (parameterDefinition(parameter).dimension === "boolean") return <>{value === 0 ? "no" : "yes"}</>;
  return <Quantity value={value} unit={unit} digits={6} basis={basis} />;
}

export function NoValue() {
  return (
    <span className="no-value">
      <span aria-hidden="true">–</span>
      <span className="visually-hidden">no value</span>
    </span>
  );
}
