import { runCheckBench } from "./check";
import { runParseBench } from "./parse";

/** Prints what was measured on this machine. */
for (const line of [...runParseBench(), ...runCheckBench()]) console.log(line);
