import { codePoint } from "./faults";
import { MAX_NAME_CHARS } from "./limits";

/** Control characters, line separators, lone surrogates and characters that reorder text: none belongs in a name. */
const UNPRINTABLE = /[\p{Cc}\p{Zl}\p{Zp}\p{Cs}\u200E\u200F\u202A-\u202E\u2066-\u2069\uFFFD]/u;

/** What is wrong with an object's name or designator (`index` counts from 0), or null when nothing is. */
export function checkObjectText(text: string, what: string): { index: number; message: string } | null {
  const odd = UNPRINTABLE.exec(text);
  if (odd)
    return { index: odd.index, message: `The ${what} holds the unprintable character ${codePoint(odd[0])}.` };
  if (text.length <= MAX_NAME_CHARS) return null;
  return {
    index: MAX_NAME_CHARS,
    message: `The ${what} has ${text.length} characters; ${MAX_NAME_CHARS} are allowed.`,
  };
}
