import { z } from "zod";
import { anyNumber, choice, notNegative, positive, within, yesNo } from "./field-notes";
import { refinedFieldSchema } from "./refined";

/**
 * The hardware of one machine. Every field may be missing, because data sheets are incomplete; a missing field
 * leads to *cannot check*, never to a guess. Units stand in the names. Temperatures are bounded by what such
 * hardware survives, so that a typing slip (a Fahrenheit value) is refused at the form.
 */
const celsius = (label: string, help?: string) => within(-60, 400, label, "°C", help);
const BASES = ["rms", "peak"] as const;

export const motorSchema = z.object({
  rated_current_a: positive("Rated current", "A", "Per winding, with both phases on"),
  rated_current_basis: choice(BASES, "Rated current is", "Data sheets mostly state rms; some state the peak"),
  resistance_ohm: positive("Winding resistance at 20 °C", "Ω"),
  inductance_mh: positive("Winding inductance", "mH"),
  holding_torque_nm: positive("Holding torque", "N·m", "Both phases on at rated current"),
  detent_torque_nm: notNegative("Detent torque", "N·m"),
  rotor_inertia_gcm2: positive("Rotor inertia", "g·cm²"),
  step_angle_deg: within(0.01, 90, "Step angle", "deg"),
  winding_limit_c: celsius("Winding limit", "Thermal class of the insulation"),
  winding_to_ambient_k_per_w: positive("Thermal resistance, winding to ambient", "K/W"),
  case_to_ambient_k_per_w: positive("Thermal resistance, case to ambient", "K/W"),
  thermal_time_constant_s: positive("Thermal time constant", "s"),
  thermal_class: choice(
    ["A", "E", "B", "F", "H"],
    "Thermal class",
    "IEC 60085: A 105 °C, E 120 °C, B 130 °C, F 155 °C, H 180 °C at the hot spot",
  ),
  rating_of: choice(
    ["winding", "half_coil"],
    "Kind of rating",
    "Half coil: current, resistance and inductance are those of a unipolar rating",
  ),
  connection: choice(
    ["half_coil", "series", "parallel"],
    "Connection of the coils",
    "For a rating of the half coil: how the coils are wired to this driver",
  ),
});

export const SET_POINT_METHODS = [
  "reference_voltage",
  "transconductance",
  "digital_scale",
  "direct",
] as const;
export const setPointSchema = z.object({
  method: choice(SET_POINT_METHODS, "Set-point method"),
  gain: positive("Gain of the current comparator", "", "I = Vref / (gain · sense resistance)"),
  gain_a_per_v: positive("Transconductance", "A/V", "I = transconductance · Vref"),
  basis: choice(BASES, "The set-point is"),
  full_scale_v: positive("Full-scale sense voltage", "V"),
  internal_resistance_ohm: notNegative("Internal resistance", "Ω", "Added to the sense resistance"),
  steps: positive("Steps of the current scale", ""),
  overall_scale: within(0, 1, "Overall scale", "", "As a share of 1"),
  sense_resistance_ohm: notNegative(
    "Sense resistance",
    "Ω",
    "Read its marking on the board itself: boards of one name differ. 0: the driver has none",
  ),
  sense_resistor_rating_w: positive("Rating of the sense resistor", "W"),
});

export const driverSchema = z.object({
  max_current_a: positive("Maximum current", "A"),
  max_current_basis: choice(BASES, "Maximum current is"),
  rds_on_ohm: positive("On-resistance, high side + low side", "Ω"),
  rds_on_at_c: celsius("On-resistance stated at"),
  junction_to_ambient_k_per_w: positive(
    "Thermal resistance, junction to ambient",
    "K/W",
    "Of this board with its cooling",
  ),
  junction_limit_c: celsius("Junction limit"),
  quiescent_power_w: notNegative("Quiescent power", "W"),
  switching_edge_ns: notNegative("Switching edge", "ns"),
  operating_max_v: positive("Highest operating voltage", "V"),
  absolute_max_v: positive("Absolute maximum voltage", "V"),
  min_pulse_high_us: positive("Shortest step pulse, high", "µs"),
  min_pulse_low_us: positive("Shortest step pulse, low", "µs"),
  min_direction_setup_us: notNegative("Shortest direction set-up", "µs"),
  min_on_time_us: positive("Minimum on-time", "µs"),
  chopping_frequency_hz: positive("Chopping frequency", "Hz"),
  decay_mode: choice(["slow", "mixed", "fast"], "Decay mode"),
  feedback: choice(
    ["open_loop", "closed_loop"],
    "Position loop",
    "A drive that corrects its position by an encoder is not covered by the checks of torque, heat and lost steps",
  ),
  set_point: setPointSchema.optional(),
});

export const DRIVE_TRAIN_KINDS = ["belt", "screw", "rack", "rotary"] as const;
export const driveTrainSchema = z.object({
  kind: choice(DRIVE_TRAIN_KINDS, "Kind"),
  pitch_mm: positive("Belt pitch", "mm"),
  teeth: positive("Teeth of the pulley or pinion", ""),
  lead_mm: positive("Lead of the screw", "mm"),
  module_mm: positive("Module of the rack", "mm"),
  ratio: positive("Ratio", "", "Motor turns for one output turn"),
  efficiency: within(0.01, 1, "Efficiency", "", "As a share of 1"),
  inertia_kgm2: notNegative("Inertia at the motor shaft", "kg·m²"),
  preload_n: notNegative("Preload of the nut", "N", "Ball screws; often a third of the greatest load"),
  preload_friction: within(
    0,
    1,
    "Inner friction of the preloaded nut",
    "",
    "0.1 to 0.3, from its data sheet",
  ),
  belt_stiffness_n_per_mm: positive(
    "Belt stiffness for each mm of width",
    "N/mm",
    "Force for unit strain, from the belt's data sheet",
  ),
  belt_width_mm: positive("Belt width", "mm"),
  belt_length_mm: positive("Belt length between the pulleys", "mm", "Both spans together"),
  axial_stiffness_n_per_um: positive(
    "Axial stiffness",
    "N/µm",
    "Screw or rack with bearings; of a belt in place of its three data above",
  ),
});

export const loadSchema = z.object({
  mass_kg: notNegative("Moving mass", "kg"),
  friction_n: notNegative("Friction force", "N", "From a pull with a spring scale"),
  incline_deg: within(-90, 90, "Incline", "deg", "0 is level, 90 straight up"),
  external_force_n: anyNumber("External force", "N"),
  counterbalance_n: notNegative("Counterbalance", "N"),
  holding_brake: yesNo("Holding brake"),
  brake_delay_ms: notNegative("Brake delay", "ms", "From the loss of power until the brake holds"),
  reference_overtravel_mm: positive(
    "Free travel behind the reference switch",
    "mm",
    "From where it switches to the hard stop",
  ),
  inertia_kgm2: notNegative("Load inertia at the output", "kg·m²", "Rotary axes"),
  friction_nm: notNegative("Friction torque at the output", "N·m", "Rotary axes"),
  external_torque_nm: anyNumber("External torque at the output", "N·m", "Rotary axes"),
  gravity_torque_nm: anyNumber("Gravity torque at the output", "N·m", "Rotary axes"),
});

export const mountSchema = z.object({
  softening_c: celsius("Softening temperature", "Heat deflection at 1.8 MPa, ISO 75"),
});

export const controllerBoardSchema = z.object({
  max_step_rate_hz: positive("Highest step rate", "Hz"),
});

export const supplySchema = z.object({
  voltage_v: positive("Voltage", "V"),
  tolerance: within(0, 0.5, "Tolerance", "", "As a share of 1"),
  rated_power_w: positive("Rated power", "W"),
  bus_capacitance_uf: positive("Bus capacitance", "µF"),
  other_load_w: notNegative("Other load", "W", "Controller, lights, heaters, valves"),
  cable_length_m: positive("Cable length to the drivers", "m", "One way"),
  cable_ohm_per_km: positive(
    "Conductor resistance at 20 °C",
    "Ω/km",
    "IEC 60228 class 5: 0.5 mm² 39.0, 0.75 mm² 26.0, 1 mm² 19.5, 1.5 mm² 13.3, 2.5 mm² 7.98",
  ),
});

export const axisAssemblySchema = z.object({
  axis: z.string().min(1).max(40),
  motor_count: z.number().int().min(1).max(8).optional(),
  motor: motorSchema.optional(),
  driver: driverSchema.optional(),
  drive_train: driveTrainSchema.optional(),
  load: loadSchema.optional(),
  mount: mountSchema.optional(),
  travel_mm: positive("Travel", "mm", "Linear axes"),
  travel_deg: positive("Travel", "deg", "Rotary axes"),
  coupled_with: z.array(z.string().min(1).max(40)).max(8).optional(),
  /** Fields of the motor that temperatures measured on this machine have refined; the motor holds their upper ends. */
  refined: z.array(refinedFieldSchema).max(4).optional(),
});

export const assemblySchema = z.object({
  ambient_c: celsius("Ambient temperature"),
  enclosure_rise_k: within(0, 100, "Rise inside the enclosure", "K"),
  motor_ambient_c: celsius("Ambient temperature of the motors"),
  supply: supplySchema.optional(),
  controller_board: controllerBoardSchema.optional(),
  axes: z.array(axisAssemblySchema).max(32),
});

export type Motor = z.infer<typeof motorSchema>;
export type SetPoint = z.infer<typeof setPointSchema>;
export type Driver = z.infer<typeof driverSchema>;
export type DriveTrain = z.infer<typeof driveTrainSchema>;
export type Load = z.infer<typeof loadSchema>;
export type Mount = z.infer<typeof mountSchema>;
export type ControllerBoard = z.infer<typeof controllerBoardSchema>;
export type Supply = z.infer<typeof supplySchema>;
export type AxisAssembly = z.infer<typeof axisAssemblySchema>;
export type Assembly = z.infer<typeof assemblySchema>;
