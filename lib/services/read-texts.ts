import type { ImportReportBody } from "@/lib/contracts/element-sets";
import { refused } from "@/lib/engagement/refusal";
import { type ParsedSet, parseElementSets } from "@/lib/formats/element-sets";
import { calculateElsewhere } from "./calculate-pool";

/** One text with where it comes from: a file name, "pasted", the name of a feed. */
export interface ImportText {
  readonly text: string;
  readonly source: string;
}

/** A text that was read: its good sets and what was refused. */
export interface ReadText {
  readonly source: string;
  readonly accepted: readonly ParsedSet[];
  readonly rejected: ImportReportBody["rejected"];
}

/** Element sets that one import takes, good and bad. */
export const MAX_IMPORT_SETS = 20_000;

/** Texts up to this are read on the spot: some 100 sets, about 25 ms. */
const SHORT_CHARS = 16_000;

/** Reads every text, long ones in a process of their own; 422 when they hold too many sets. */
export async function readTexts(texts: readonly ImportText[]): Promise<ReadText[]> {
  const read: ReadText[] = [];
  let count = 0;
  for (const { text, source } of texts) {
    const parsed =
      text.length <= SHORT_CHARS
        ? parseElementSets(text)
        : await calculateElsewhere("read-element-sets", text);
    count += parsed.accepted.length + parsed.rejected.length;
    if (count > MAX_IMPORT_SETS) throw tooMany(source);
    const rejected = parsed.rejected.map(({ line, column, message }) => ({ line, column, message }));
    read.push({ source, accepted: parsed.accepted, rejected });
  }
  return read;
}

function tooMany(source: string) {
  const most = MAX_IMPORT_SETS.toLocaleString("en");
  return refused(`More than ${most} element sets at once are not taken; split the file.`, [
    { path: source, message: `the limit of ${most} element sets is reached in here` },
  ]);
}
