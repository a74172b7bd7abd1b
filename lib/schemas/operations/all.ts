import type { Operation } from "@/lib/schemas/operation";
import { catalogOperations } from "./catalog";
import { changeOperations } from "./changes";
import { checkOperations } from "./check";
import { deskOperations } from "./desk";
import { keyTableOperations } from "./key-tables";
import { machineOperations } from "./machines";
import { machineWriteOperations } from "./machines-write";
import { measuredHeatOperations } from "./measured-heat";
import { peopleOperations } from "./people";
import { readingOperations } from "./readings";
import { rehearsalOperations } from "./rehearsals";
import { testSheetOperations } from "./test-sheets";
import { textOperations } from "./texts";

/** Every door of the API. Routes answer through them, OpenAPI describes them, the access test walks them. */
export const ALL_OPERATIONS: readonly Operation[] = [
  ...Object.values(catalogOperations),
  ...Object.values(changeOperations),
  ...Object.values(checkOperations),
  ...Object.values(deskOperations),
  ...Object.values(keyTableOperations),
  ...Object.values(machineOperations),
  ...Object.values(machineWriteOperations),
  ...Object.values(measuredHeatOperations),
  ...Object.values(peopleOperations),
  ...Object.values(readingOperations),
  ...Object.values(rehearsalOperations),
  ...Object.values(testSheetOperations),
  ...Object.values(textOperations),
];
