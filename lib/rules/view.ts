import type { AxisAssembly } from "@/lib/domain/assembly";
import { axisKind } from "@/lib/domain/axis-kind";
import type { ParameterName } from "@/lib/domain/parameters";
import type { QuantityName } from "@/lib/domain/quantities";
import type { ParameterValue } from "@/lib/domain/values";
import { unusable } from "./data";
import { isClosedLoop, notCovered, presumesOpenLoop } from "./quantities/open-loop";
import { AXIS_QUANTITIES, isMachineQuantity, MACHINE_QUANTITIES, rests } from "./quantities/table";
import type { MachineQuantityName } from "./quantities/table";
import type { AxisView, Computed, RuleContext, RuleInput } from "./types";

type ByName = ReadonlyMap<ParameterName, ParameterValue>;

const NO_PARAMETERS: ByName = new Map();

/** Parameters by axis, the axis in lower case, "" for the machine's own; a later value takes an earlier one's place. */
function indexed(parameters: readonly ParameterValue[]): ReadonlyMap<string, ByName> {
  const byAxis = new Map<string, Map<ParameterName, ParameterValue>>();
  for (const parameter of parameters) {
    const axis = parameter.axis?.toLowerCase() ?? "";
    const byName = byAxis.get(axis) ?? new Map<ParameterName, ParameterValue>();
    byName.set(parameter.parameter, parameter);
    byAxis.set(axis, byName);
  }
  return byAxis;
}

/** What the rules see of a machine. Quantities are computed when first asked for. */
export function ruleContext(input: RuleInput): RuleContext {
  const byAxis = indexed(input.parameters);
  const machine = byAxis.get("") ?? NO_PARAMETERS;
  const axes = input.assembly.axes.map((hardware) =>
    axisView({
      input,
      hardware,
      values: new Map([...machine, ...(byAxis.get(hardware.axis.toLowerCase()) ?? NO_PARAMETERS)]),
    }),
  );
  return contextOf(input, axes);
}

function contextOf(input: RuleInput, axes: readonly AxisView[]): RuleContext {
  const known = new Map<MachineQuantityName, Computed>();
  const context: RuleContext = {
    input,
    axes,
    quantity: (name) => {
      if (!isMachineQuantity(name)) return unusable(`${name} is a quantity of an axis.`);
      const found = known.get(name) ?? MACHINE_QUANTITIES[name].compute(context);
      known.set(name, found);
      return found;
    },
    withValue: (axis, name, value) =>
      contextOf(
        input,
        axes.map((view) => (view.axis === axis ? view.withValue(name, value) : view)),
      ),
  };
  return context;
}

interface AxisFacts {
  readonly input: RuleInput;
  readonly hardware: AxisAssembly;
  readonly values: ByName;
}

/** An axis as it was, and the one parameter that is now another. */
interface Before {
  readonly view: AxisView;
  readonly moved: ParameterName;
  readonly value: ParameterValue;
}

/** Field by field: a search for a clearing value tries dozens. */
function withNumber(stated: ParameterValue, value: number): ParameterValue {
  const { axis, parameter, unit, basis, typed, source } = stated;
  return { axis, parameter, value, unit, basis, typed, source };
}

function axisView(facts: AxisFacts, before?: Before): AxisView {
  const { input, hardware, values } = facts;
  const known = new Map<QuantityName, Computed>();
  const parameter = (name: ParameterName) =>
    before === undefined
      ? values.get(name)
      : name === before.moved
        ? before.value
        : before.view.parameter(name);
  const compute = (name: QuantityName): Computed => {
    if (isMachineQuantity(name)) return unusable(`${name} is a quantity of the machine.`);
    if (isClosedLoop(hardware) && presumesOpenLoop(name)) return notCovered(hardware.axis);
    // What the changed parameter cannot move is the same as before.
    if (before && !rests(name, before.moved)) return before.view.quantity(name);
    return AXIS_QUANTITIES[name].compute(view);
  };
  const view: AxisView = {
    axis: hardware.axis,
    kind: axisKind(hardware.drive_train?.kind),
    hardware,
    assembly: input.assembly,
    policy: input.policy,
    parameter,
    quantity: (name) => {
      const found = known.get(name) ?? compute(name);
      known.set(name, found);
      return found;
    },
    withValue: (name, value) => {
      const stated = parameter(name);
      return stated ? axisView(facts, { view, moved: name, value: withNumber(stated, value) }) : view;
    },
  };
  return view;
}
