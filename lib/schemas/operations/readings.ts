import { idParams } from "@/lib/schemas/common";
import { MAX_UPLOAD_BYTES } from "@/lib/schemas/files";
import { operation } from "@/lib/schemas/operation";
import {
  createdReadingSchema,
  createReadingSchema,
  readingFileParams,
  readingPageSchema,
  readingQuery,
  readingViewSchema,
} from "@/lib/schemas/readings";

const TAG = "Readings";

export const readingOperations = {
  createReading: operation({
    id: "createReading",
    method: "POST",
    path: "/machines/{id}/readings",
    action: "readings.create",
    summary: "Keep a reading of a machine and say where the machine stands with it",
    tag: TAG,
    params: idParams,
    body: createReadingSchema,
    maxBytes: MAX_UPLOAD_BYTES,
    answer: createdReadingSchema,
    status: 201,
    idempotent: true,
  }),
  listReadings: operation({
    id: "listReadings",
    method: "GET",
    path: "/readings",
    action: "readings.read",
    summary: "Readings, newest first",
    tag: TAG,
    query: readingQuery,
    answer: readingPageSchema,
  }),
  showReading: operation({
    id: "showReading",
    method: "GET",
    path: "/readings/{id}",
    action: "readings.read",
    summary: "A reading with its texts, parameters, findings, provenance of currents and unmapped keys",
    tag: TAG,
    params: idParams,
    answer: readingViewSchema,
  }),
  readingFile: operation({
    id: "readingFile",
    method: "GET",
    path: "/readings/{id}/files/{position}",
    action: "readings.read",
    summary: "One file of a reading, byte for byte",
    tag: TAG,
    params: readingFileParams,
    answer: { mediaType: "application/octet-stream" },
  }),
} as const;
