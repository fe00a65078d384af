import { fullRejection, isFull, rejectionOf } from "./faults";
import type { ParsedText } from "./set-types";
import { splitLines } from "./text-lines";
import { linesOf, rawOf, rejectOverlong, rejectUnpaired } from "./tle-groups";
import { groupTleLines } from "./tle-lines";
import { readTlePair } from "./tle-pair";

/**
 * Reads two-line and three-line (name line first) element sets. Blank lines and
 * lines that begin with # are passed over. Every bad set gives one rejection, and
 * the next good one is read all the same. Never throws.
 */
export function parseTle(text: string): ParsedText {
  const result: ParsedText = { accepted: [], rejected: [] };
  for (const group of groupTleLines(splitLines(text))) {
    const line = linesOf(group)[0].number;
    if (isFull(result)) {
      result.rejected.push(fullRejection(line, 1));
      break;
    }
    const overlong = rejectOverlong(group, text);
    if (overlong) result.rejected.push(overlong);
    else if (group.kind !== "pair") result.rejected.push(rejectUnpaired(group, text));
    else {
      const raw = rawOf(group, text);
      const read = readTlePair(group);
      if (read.ok) result.accepted.push({ elements: read.elements, format: "tle", raw, line });
      else result.rejected.push(rejectionOf(read.faults, raw));
    }
  }
  return result;
}
