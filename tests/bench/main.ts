import { runCheckBench } from "./check";
import { runMapBench } from "./map";
import { runParseBench } from "./parse";
import { runRulesBench } from "./rules";

/** Prints what was measured on this machine. */
for (const line of [...runParseBench(), ...runRulesBench(), ...runCheckBench(), ...runMapBench()])
  console.log(line);
