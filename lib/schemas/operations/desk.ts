import { z } from "zod";
import { retireSchema } from "@/lib/schemas/codes";
import { idParams } from "@/lib/schemas/common";
import { operation } from "@/lib/schemas/operation";
import { policiesSchema, policyVersionSchema, savePolicySchema } from "@/lib/schemas/policies";
import { chainVerdictSchema, recordPageSchema, recordQuery } from "@/lib/schemas/record";
import { searchAnswerSchema, searchQuery } from "@/lib/schemas/search";
import {
  createSiteSchema,
  siteListSchema,
  siteQuery,
  siteViewSchema,
  updateSiteSchema,
} from "@/lib/schemas/sites";

const SITES = "Sites";
const POLICY = "Policy";
const RECORD = "Record";
const DESK = "The desk itself";

export const deskOperations = {
  listSites: operation({
    id: "listSites",
    method: "GET",
    path: "/sites",
    action: "catalog.read",
    summary: "Sites with their ambient temperature",
    tag: SITES,
    query: siteQuery,
    answer: siteListSchema,
  }),
  createSite: operation({
    id: "createSite",
    method: "POST",
    path: "/sites",
    action: "sites.write",
    summary: "Add a site",
    tag: SITES,
    body: createSiteSchema,
    answer: siteViewSchema,
    status: 201,
  }),
  showSite: operation({
    id: "showSite",
    method: "GET",
    path: "/sites/{id}",
    action: "catalog.read",
    summary: "One site",
    tag: SITES,
    params: idParams,
    answer: siteViewSchema,
  }),
  updateSite: operation({
    id: "updateSite",
    method: "PUT",
    path: "/sites/{id}",
    action: "sites.write",
    summary: "Change a site; after another ambient temperature its machines are checked again",
    tag: SITES,
    params: idParams,
    body: updateSiteSchema,
    answer: siteViewSchema,
    ifMatch: "required",
  }),
  retireSite: operation({
    id: "retireSite",
    method: "POST",
    path: "/sites/{id}/retire",
    action: "sites.write",
    summary: "Take a site without machines out of use, or back into use",
    tag: SITES,
    params: idParams,
    body: retireSchema,
    answer: siteViewSchema,
  }),
  showPolicies: operation({
    id: "showPolicies",
    method: "GET",
    path: "/policies",
    action: "policies.read",
    summary: "The team's margins of this moment and their earlier versions",
    tag: POLICY,
    answer: policiesSchema,
  }),
  savePolicy: operation({
    id: "savePolicy",
    method: "POST",
    path: "/policies",
    action: "policies.write",
    summary: "Save a new version of the team's margins; the whole fleet is checked again",
    tag: POLICY,
    body: savePolicySchema,
    answer: policyVersionSchema,
    status: 201,
    ifMatch: "required",
  }),
  searchRecord: operation({
    id: "searchRecord",
    method: "GET",
    path: "/record",
    action: "record.read",
    summary: "The record of every act, newest first",
    tag: RECORD,
    query: recordQuery,
    answer: recordPageSchema,
  }),
  verifyRecord: operation({
    id: "verifyRecord",
    method: "GET",
    path: "/record/verify",
    action: "record.read",
    summary: "Compute the record's chain again and say whether anything in it was altered",
    tag: RECORD,
    answer: chainVerdictSchema,
  }),
  search: operation({
    id: "search",
    method: "GET",
    path: "/search",
    action: "search.read",
    summary: "Find machines, changes, hardware, models, sites and acts by words",
    tag: DESK,
    query: searchQuery,
    answer: searchAnswerSchema,
  }),
  health: operation({
    id: "health",
    method: "GET",
    path: "/health",
    action: null,
    summary: "Whether the desk and its database answer",
    tag: DESK,
    answer: z.object({ status: z.literal("ok") }),
  }),
  openApi: operation({
    id: "openApi",
    method: "GET",
    path: "/openapi.json",
    action: null,
    summary: "This description",
    tag: DESK,
    answer: z.record(z.string(), z.unknown()),
  }),
} as const;
