import {
  acceptRuleSchema,
  keyTableParams,
  keyTableQuery,
  keyTableViewSchema,
  saveKeyTableSchema,
  setBasisSchema,
} from "@/lib/schemas/key-tables";
import { operation } from "@/lib/schemas/operation";

const TAG = "Key tables";

export const keyTableOperations = {
  showKeyTable: operation({
    id: "showKeyTable",
    method: "GET",
    path: "/key-tables",
    action: "catalog.read",
    summary: "The key table of a machine model with its versions",
    tag: TAG,
    query: keyTableQuery,
    answer: keyTableViewSchema,
  }),
  saveKeyTable: operation({
    id: "saveKeyTable",
    method: "POST",
    path: "/key-tables",
    action: "key_tables.write",
    summary: "Save a new version of a key table; the model's machines are checked again",
    tag: TAG,
    body: saveKeyTableSchema,
    answer: keyTableViewSchema,
    status: 201,
    ifMatch: "required",
  }),
  acceptRule: operation({
    id: "acceptKeyRule",
    method: "POST",
    path: "/key-tables/{modelId}/accept",
    action: "key_tables.write",
    summary: "Add one rule to the key table, as suggested for an unmapped key",
    tag: TAG,
    params: keyTableParams,
    body: acceptRuleSchema,
    answer: keyTableViewSchema,
  }),
  setBasis: operation({
    id: "setCurrentBasis",
    method: "POST",
    path: "/key-tables/{modelId}/basis",
    action: "key_tables.write",
    summary: "Say once whether a current of the text is peak or rms",
    tag: TAG,
    params: keyTableParams,
    body: setBasisSchema,
    answer: keyTableViewSchema,
  }),
} as const;
