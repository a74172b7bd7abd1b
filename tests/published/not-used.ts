/** Published values that this project has no use for, with the reason: no code is written only to meet a row. */
export const NOT_USED: readonly {
  readonly value: string;
  readonly source: string;
  readonly reason: string;
}[] = [
  {
    value: "inertia and mass of a round bar (three rows)",
    source: "FANUC B-65142E/04 p. 31; Omron CSM_TG_E_3_1; Weihong WISE manual sec. 3.5.2.1",
    reason: "the inertia of a drive train is entered as a number, not worked out from its dimensions",
  },
  {
    value: "acceleration torque of 364 oz·in",
    source: "Techno Linear Motion Catalog H834, pp. 30-31",
    reason:
      "it is twice J·α of its own numbers (18.25 lb·in², 3820 steps/s in 0.5 s at 1.8°: 1.28 N·m or 182 oz·in); Newton's law is kept",
  },
  {
    value: "torque that raises a load on a square thread",
    source: "Adaptive Books, Statics 5.6.1, problem 2",
    reason: "the efficiency of a screw is entered as a number, not worked out from its thread",
  },
  {
    value: "speed at a corner from its deviation",
    source: "geometry",
    reason:
      "the jump of one axis depends on the path as well, so that a corner deviation alone gives cannot check",
  },
  {
    value: "modified z-scores (three rows)",
    source: "Iglewicz & Hoaglin (1993)",
    reason: "machines are compared with their required configuration, not with the middle of the fleet",
  },
];
