import { runCheckBench } from "./check";
import { runMapBench } from "./map";
import { runMoveBench } from "./move";
import { runFormatsBench } from "./formats";
import { runParseBench } from "./parse";
import { runReviseBench } from "./revise";
import { runRulesBench } from "./rules";

/** Prints what was measured on this machine. */
for (const line of [
  ...runParseBench(),
  ...runFormatsBench(),
  ...runRulesBench(),
  ...runCheckBench(),
  ...runMapBench(),
  ...runMoveBench(),
  ...runReviseBench(),
])
  console.log(line);
