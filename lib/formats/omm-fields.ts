import type { Elements } from "@/lib/physics/orbit/elements";
import { MAX_CATALOG_NUMBER } from "./catalog-number";
import { checkAtEpoch, checkRanges } from "./element-checks";
import { quote } from "./faults";
import { checkObjectText } from "./object-text";
import { OMM_EPOCH_FORM, readOmmEpoch } from "./omm-epoch";
import { FIXED_KEYWORDS, NUMBER_KEYWORDS, READ_VERSIONS } from "./omm-keywords";

/** A keyword's value as written, and the offset in the text at which it stands. */
export interface OmmField {
  /** The value as text; null where the form says "no value" (JSON null, an empty element). */
  readonly text: string | null;
  readonly offset: number;
  /** What stands there instead of a value ("a list", "an object", "true"), or null. */
  readonly notAValue: string | null;
  /** The unit written beside the value, or null. */
  readonly unit: string | null;
}

/** One thing wrong in an OMM, at an offset in the text. */
export interface OmmFault {
  readonly offset: number;
  readonly message: string;
}

type OmmResult =
  | { readonly ok: true; readonly elements: Elements }
  | { readonly ok: false; readonly faults: readonly [OmmFault, ...OmmFault[]] };

type NumberKey = (typeof NUMBER_KEYWORDS)[number]["key"];

const NUMBER_FORM = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,3})?$/;

/**
 * The elements of one OMM, whatever encoding its keywords came in, or everything
 * that is wrong with it in text order. `setOffset` is where the set begins: missing
 * keywords and SGP4's own refusal are reported there. Unknown keywords are let be.
 */
export function readOmm(fields: ReadonlyMap<string, OmmField>, setOffset: number): OmmResult {
  const faults: OmmFault[] = [];
  const report = (offset: number, message: string): void => {
    faults.push({ offset, message });
  };
  checkFixed(fields, report);
  const elements: Elements = {
    catalogNumber: readCatalogNumber(fields, setOffset, report),
    objectName: readText(fields, "OBJECT_NAME", report),
    objectId: readText(fields, "OBJECT_ID", report),
    epochMs: readEpoch(fields, setOffset, report),
    ...readNumbers(fields, setOffset, report),
  };
  if (faults.length === 0) {
    for (const { key, message } of checkRanges(elements)) {
      const keyword = NUMBER_KEYWORDS.find((n) => n.key === key)?.keyword ?? "EPOCH";
      report(fields.get(keyword)?.offset ?? setOffset, message);
    }
  }
  const atEpoch = faults.length === 0 ? checkAtEpoch(elements) : null;
  if (atEpoch) report(setOffset, atEpoch);
  const [first, ...further] = faults.sort((a, b) => a.offset - b.offset);
  return first ? { ok: false, faults: [first, ...further] } : { ok: true, elements };
}

type Report = (offset: number, message: string) => void;

/** The text of a keyword; null when it is absent, empty, or holds no plain value (which is reported). */
function valueIn(fields: ReadonlyMap<string, OmmField>, keyword: string, report: Report): string | null {
  const field = fields.get(keyword);
  if (!field) return null;
  if (field.notAValue) report(field.offset, `${keyword} is ${field.notAValue}; a plain value is expected.`);
  return field.text === null || field.text.trim() === "" ? null : field.text.trim();
}

function checkFixed(fields: ReadonlyMap<string, OmmField>, report: Report): void {
  for (const { keyword, allowed } of FIXED_KEYWORDS) {
    const value = valueIn(fields, keyword, report);
    if (value === null || allowed.includes(value.toUpperCase())) continue;
    report(
      fields.get(keyword)?.offset ?? 0,
      `${keyword} is ${quote(value)}; only ${allowed.join(" or ")} can be used.`,
    );
  }
  const version = valueIn(fields, "CCSDS_OMM_VERS", report);
  if (version === null || READ_VERSIONS.test(version)) return;
  report(
    fields.get("CCSDS_OMM_VERS")?.offset ?? 0,
    `The OMM version is ${quote(version)}; 2.0 and 3.0 are read.`,
  );
}

/** A required keyword's text; its absence is reported, unless something else stands there, which is reported too. */
function requiredValue(
  fields: ReadonlyMap<string, OmmField>,
  keyword: string,
  setOffset: number,
  report: Report,
): string | null {
  const value = valueIn(fields, keyword, report);
  const field = fields.get(keyword);
  if (value === null && !field?.notAValue) {
    report(field?.offset ?? setOffset, `${keyword} ${field ? "has no value" : "is missing"}.`);
  }
  return value;
}

function readCatalogNumber(fields: ReadonlyMap<string, OmmField>, setOffset: number, report: Report): number {
  const text = requiredValue(fields, "NORAD_CAT_ID", setOffset, report);
  if (text === null) return Number.NaN;
  const value = /^\d{1,9}$/.test(text) ? Number(text) : Number.NaN;
  if (value >= 1 && value <= MAX_CATALOG_NUMBER) return value;
  const message = `NORAD_CAT_ID is ${quote(text)}; a number of one to nine digits above 0 is expected.`;
  report(fields.get("NORAD_CAT_ID")?.offset ?? setOffset, message);
  return Number.NaN;
}

function readEpoch(fields: ReadonlyMap<string, OmmField>, setOffset: number, report: Report): number {
  const text = requiredValue(fields, "EPOCH", setOffset, report);
  if (text === null) return Number.NaN;
  const epochMs = readOmmEpoch(text);
  if (epochMs !== null) return epochMs;
  report(fields.get("EPOCH")?.offset ?? setOffset, `EPOCH is ${quote(text)}; expected: ${OMM_EPOCH_FORM}.`);
  return Number.NaN;
}

function readText(fields: ReadonlyMap<string, OmmField>, keyword: string, report: Report): string | null {
  const text = valueIn(fields, keyword, report);
  const wrong = text === null ? null : checkObjectText(text, keyword);
  if (wrong) report(fields.get(keyword)?.offset ?? 0, wrong.message);
  return text;
}

function readNumbers(
  fields: ReadonlyMap<string, OmmField>,
  setOffset: number,
  report: Report,
): Record<NumberKey, number> {
  const numbers = {} as Record<NumberKey, number>;
  for (const { keyword, key, required, unit } of NUMBER_KEYWORDS) {
    checkUnit(keyword, unit, fields.get(keyword), report);
    const text = required
      ? requiredValue(fields, keyword, setOffset, report)
      : valueIn(fields, keyword, report);
    if (text === null) {
      numbers[key] = required ? Number.NaN : 0;
      continue;
    }
    // Adding 0 makes 0 of -0, which no form could carry further.
    const value = NUMBER_FORM.test(text) ? Number(text) + 0 : Number.NaN;
    numbers[key] = value;
    if (Number.isFinite(value)) continue;
    report(
      fields.get(keyword)?.offset ?? setOffset,
      `${keyword} is ${quote(text)}; a finite number is expected.`,
    );
  }
  return numbers;
}

/** A unit may be left out; one that is written must be the book's, for the value would mean something else. */
function checkUnit(
  keyword: string,
  expected: string | null,
  field: OmmField | undefined,
  report: Report,
): void {
  if (!field || field.unit === null || field.unit.toLowerCase() === expected?.toLowerCase()) return;
  const right = expected === null ? "it has none" : `expected: ${expected}`;
  report(field.offset, `The unit of ${keyword} is ${quote(field.unit)}; ${right}.`);
}
