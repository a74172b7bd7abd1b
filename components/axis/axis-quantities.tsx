import { Facts, type Fact } from "@/components/ui/facts";
import { Quantity } from "@/components/ui/quantity";
import type { Quantity as Computed, QuantityName } from "@/lib/domain/quantities";
import { QUANTITIES } from "@/lib/domain/quantities";
import { percent } from "./picture-words";

/** What says most of an axis, in this order. */
const KEY_QUANTITIES: readonly QuantityName[] = [
  "winding_current_rms",
  "hold_current_rms",
  "peak_speed",
  "voltage_limit_speed",
  "torque_margin",
  "ramp_torque_margin",
  "winding_c",
  "case_c",
  "driver_junction_c",
  "start_stop_speed",
  "resonance_hz",
  "step_rate",
];

const SHARES: readonly QuantityName[] = ["torque_margin", "ramp_torque_margin"];

/** The key numbers of an axis; its checks say how each is reckoned. */
export function AxisQuantities({ quantities }: { readonly quantities: readonly Computed[] }) {
  const facts = KEY_QUANTITIES.flatMap((name): Fact[] => {
    const found = quantities.find((quantity) => quantity.name === name);
    if (!found) return [];
    const { value, unit } = found;
    return [
      {
        label: QUANTITIES[name].label,
        value: SHARES.includes(name) ? percent(value) : <Quantity value={value} unit={unit} />,
      },
    ];
  });
  if (facts.length === 0) return <p className="quiet">No quantity of this axis can be computed yet.</p>;
  return <Facts facts={facts} />;
}
