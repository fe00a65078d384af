import type { AirspaceVolumeBody } from "./airspace";
import type { AuthorityBody } from "./authorities";
import { type ElementSetBody, elementSetQuery, type ImportReportBody, importOptions } from "./element-sets";
import { type LedgerBody, ledgerQuery } from "./engagements";
import type { FragmentBody, FragmentSheetBody } from "./fragments";
import { type ApiRoute, json } from "./openapi-route";
import type { ProtectedListBody } from "./protected";
import type { StationBody } from "./stations";

/** Objects with their element sets, and the records that rules read. */
export const RECORDS: readonly ApiRoute[] = [
  {
    method: "get",
    path: "/api/element-sets",
    tag: "element sets",
    summary: "The history of one object.",
    query: elementSetQuery,
    gives: json<{ elementSets: ElementSetBody[] }>()("Sets, newest epoch first.", "elementSets"),
    refusals: [404],
  },
  {
    method: "post",
    path: "/api/element-sets",
    tag: "element sets",
    summary: "Imports a text of element sets; the good ones are kept, the bad ones named by line and column.",
    query: importOptions,
    body: {
      mediaTypes: ["text/plain", "application/json", "multipart/form-data"],
      words: "TLE with or without name lines, or OMM, as raw body or as files. `preview=1` only reports.",
    },
    gives: json<ImportReportBody>()("The report.", "accepted", "rejected", "duplicates", "older"),
    refusals: [413, 422],
  },
  {
    method: "get",
    path: "/api/fragments",
    tag: "element sets",
    summary: "Every fragment with its newest element set and what lies ahead.",
    gives: json<{ fragments: FragmentBody[] }>()("Fragments by name.", "fragments"),
  },
  {
    method: "get",
    path: "/api/fragments/{id}",
    tag: "element sets",
    summary: "One fragment with its orbit, element sets and engagements.",
    gives: json<FragmentSheetBody>()("The fragment.", "id", "name", "orbit", "elementSets", "engagements"),
    refusals: [404],
  },
  {
    method: "get",
    path: "/api/protected",
    tag: "records",
    summary: "The protected objects by class, with what is kept free around each.",
    gives: json<ProtectedListBody>()("Classes and objects.", "classes", "objects"),
  },
  {
    method: "get",
    path: "/api/stations",
    tag: "records",
    summary: "Every station with its limits and laser settings.",
    gives: json<{ stations: StationBody[] }>()("Stations by name.", "stations"),
  },
  {
    method: "get",
    path: "/api/airspace",
    tag: "records",
    summary: "Every airspace volume with its hours ahead.",
    gives: json<{ volumes: AirspaceVolumeBody[] }>()("Volumes by name.", "volumes"),
  },
  {
    method: "get",
    path: "/api/authorities",
    tag: "records",
    summary: "Every authority with its contacts, hours and deadlines.",
    gives: json<{ authorities: AuthorityBody[] }>()("Authorities by name.", "authorities"),
  },
  {
    method: "get",
    path: "/api/ledger",
    tag: "records",
    summary: "The ledger, newest first; send `nextBefore` as `before` to read on.",
    query: ledgerQuery,
    gives: json<{ entries: LedgerBody[]; nextBefore: number | null }>()("Entries.", "entries", "nextBefore"),
  },
];
