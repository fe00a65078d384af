import type { Elements } from "@/lib/physics/orbit/elements";
import { readTleCatalogNumber } from "./catalog-number";
import { checkAtEpoch, checkRanges } from "./element-checks";
import { quote } from "./faults";
import { checkObjectText } from "./object-text";
import type { Fault } from "./set-types";
import type { TextLine } from "./text-lines";
import { fullYear, readTleEpoch } from "./tle-epoch";
import { LINE1, LINE2, readDecimal, readExponent, type TleField, textOf } from "./tle-fields";
import { checkTleLine } from "./tle-line-check";
import type { TleGroup } from "./tle-lines";

/** A name line, if any, and the two element lines, either of which may be damaged. */
export type TlePair = Extract<TleGroup, { kind: "pair" }>;

type PairResult =
  | { readonly ok: true; readonly elements: Elements }
  | { readonly ok: false; readonly faults: [Fault, ...Fault[]] };

/** Where each element stands: on line 1 or 2, in which field. */
const PLACES: Partial<Record<keyof Elements, readonly [1 | 2, TleField]>> = {
  catalogNumber: [1, LINE1.catalogNumber],
  epochMs: [1, LINE1.epoch],
  meanMotionDot: [1, LINE1.meanMotionDot],
  meanMotionDdot: [1, LINE1.meanMotionDdot],
  bstar: [1, LINE1.bstar],
  inclinationDeg: [2, LINE2.inclination],
  raanDeg: [2, LINE2.raan],
  eccentricity: [2, LINE2.eccentricity],
  argPericenterDeg: [2, LINE2.argPericenter],
  meanAnomalyDeg: [2, LINE2.meanAnomaly],
  meanMotionRevPerDay: [2, LINE2.meanMotion],
};

/**
 * The elements of a pair, or all its faults: form and checksum first, then sense
 * (numbers that agree, epoch, ranges), at last SGP4's own word at the epoch.
 */
export function readTlePair(pair: TlePair): PairResult {
  const { name, first, second } = pair;
  const formFaults = [...nameFaults(name), ...checkTleLine(first, 1), ...checkTleLine(second, 2)];
  if (isSome(formFaults)) return { ok: false, faults: formFaults };
  const elements = elementsOf(pair);
  const senseFaults = [...lineOneFaults(pair, elements), ...rangeFaults(pair, elements)];
  if (isSome(senseFaults)) return { ok: false, faults: senseFaults };
  const message = checkAtEpoch(elements);
  if (message) return { ok: false, faults: [{ line: first.number, column: 1, message }] };
  return { ok: true, elements };
}

function isSome(faults: Fault[]): faults is [Fault, ...Fault[]] {
  return faults.length > 0;
}

/** The object's name from its line: blanks at both ends and the "0 " of some catalogues taken off. */
function nameOf(line: TextLine | null): string | null {
  const text = line?.text.replace(/^0 /, "").trim() ?? "";
  return text === "" ? null : text;
}

function nameFaults(line: TextLine | null): Fault[] {
  if (!line) return [];
  const wrong = checkObjectText(line.text, "name line");
  return wrong ? [{ line: line.number, column: wrong.index + 1, message: wrong.message }] : [];
}

/** The form must have been checked: values that are still out of sense come out as NaN. */
function elementsOf({ name, first, second }: TlePair): Elements {
  const one = (f: TleField): string => textOf(first.text, f);
  const two = (f: TleField): number => readDecimal(textOf(second.text, f));
  return {
    catalogNumber: readTleCatalogNumber(one(LINE1.catalogNumber)) ?? Number.NaN,
    objectName: nameOf(name),
    objectId: designatorOf(one(LINE1.designator)),
    epochMs: readTleEpoch(one(LINE1.epoch)) ?? Number.NaN,
    meanMotionRevPerDay: two(LINE2.meanMotion),
    eccentricity: Number(`0.${textOf(second.text, LINE2.eccentricity)}`),
    inclinationDeg: two(LINE2.inclination),
    raanDeg: two(LINE2.raan),
    argPericenterDeg: two(LINE2.argPericenter),
    meanAnomalyDeg: two(LINE2.meanAnomaly),
    bstar: readExponent(one(LINE1.bstar)),
    meanMotionDot: readDecimal(one(LINE1.meanMotionDot)),
    meanMotionDdot: readExponent(one(LINE1.meanMotionDdot)),
  };
}

/** "99025MZ " becomes "1999-025MZ", eight blanks become null. */
function designatorOf(text: string): string | null {
  const compact = text.trim();
  if (compact === "") return null;
  return `${fullYear(Number(compact.slice(0, 2)))}-${compact.slice(2)}`;
}

function lineOneFaults({ first, second }: TlePair, elements: Elements): Fault[] {
  const faults: Fault[] = [];
  const at = (line: TextLine, f: TleField, message: string): void => {
    faults.push({ line: line.number, column: f.from, message });
  };
  const number = textOf(first.text, LINE1.catalogNumber);
  const other = textOf(second.text, LINE2.catalogNumber);
  if (Number.isNaN(elements.catalogNumber)) {
    const expected = "expected: a number above 00000, or a letter without I and O and four digits";
    at(first, LINE1.catalogNumber, `The catalogue number is ${quote(number)}; ${expected}.`);
  }
  if (number !== other) {
    at(
      second,
      LINE2.catalogNumber,
      `The catalogue number is ${quote(other)} here but ${quote(number)} on line 1.`,
    );
  }
  if (Number.isNaN(elements.epochMs)) {
    const epoch = textOf(first.text, LINE1.epoch);
    at(
      first,
      LINE1.epoch,
      `The epoch is ${quote(epoch)}; year ${fullYear(Number(epoch.slice(0, 2)))} has no such day.`,
    );
  }
  const type = textOf(first.text, LINE1.ephemerisType);
  if (type !== "0" && type !== " ") {
    at(first, LINE1.ephemerisType, `The ephemeris type is ${type}; only sets for SGP4 (type 0) can be used.`);
  }
  return faults;
}

function rangeFaults({ first, second }: TlePair, elements: Elements): Fault[] {
  // An epoch that is no date has been named already.
  const judged = Number.isNaN(elements.epochMs) ? { ...elements, epochMs: 0 } : elements;
  return checkRanges(judged).map(({ key, message }) => {
    const [which, f] = PLACES[key] ?? [1, LINE1.lineNumber];
    return { line: (which === 1 ? first : second).number, column: f.from, message };
  });
}
