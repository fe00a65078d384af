import type { Elements } from "@/lib/physics/orbit/elements";

/** The file forms in which element sets are read. */
export type SetFormat = "tle" | "omm-json" | "omm-kvn" | "omm-xml" | "omm-csv";

/** One element set that passed every check. */
export interface ParsedSet {
  readonly elements: Elements;
  readonly format: SetFormat;
  /** The set's own text, unchanged: its name line, line 1 and line 2, or its OMM text. */
  readonly raw: string;
  /** 1-based line of the file on which the set begins. */
  readonly line: number;
}

/** One element set, or stretch of text, that was refused; line and column are 1-based. */
export interface RejectedSet {
  readonly line: number;
  readonly column: number;
  readonly message: string;
  /** The refused text, unchanged; cut after 4,000 characters. */
  readonly raw: string;
}

/** What a whole text gave. */
export interface ParsedText {
  readonly accepted: ParsedSet[];
  readonly rejected: RejectedSet[];
}

/** One thing that is wrong, at a place in the file (1-based). */
export interface Fault {
  readonly line: number;
  readonly column: number;
  readonly message: string;
}
