/** One field of a TLE line: its columns (1-based, both included), its form, and that form in words. */
export interface TleField {
  readonly name: string;
  readonly from: number;
  readonly to: number;
  readonly form: RegExp;
  readonly expected: string;
}

const EXPONENT = /^[ +-]\d{5}[+-]\d$/;
const ANGLE = /^(?: {2}\d|[ 0-9]\d\d|\d{3})\.\d{4}$/;

function field(name: string, from: number, to: number, form: RegExp, expected: string): TleField {
  return { name, from, to, form, expected };
}

/**
 * The columns of line 1. Layout as laid down in Spacetrack Report No. 3 and
 * restated in Vallado et al. 2006, AIAA 2006-6753, appendix A (from memory).
 */
export const LINE1 = {
  lineNumber: field("line number", 1, 1, /^1$/, "1"),
  catalogNumber: field(
    "catalogue number",
    3,
    7,
    /^[0-9A-Z]\d{4}$/,
    "five digits, or a letter and four digits",
  ),
  classification: field("classification", 8, 8, /^[UCS]$/, "U, C or S"),
  designator: field(
    "international designator",
    10,
    17,
    /^(?: {8}|\d{5}(?:[A-Z] {2}|[A-Z]{2} |[A-Z]{3}))$/,
    "two digits of the year, three of the launch and one to three letters, or eight blanks",
  ),
  epoch: field("epoch", 19, 32, /^\d{5}\.\d{8}$/, "YYDDD.DDDDDDDD"),
  meanMotionDot: field(
    "first derivative of the mean motion",
    34,
    43,
    /^[ +-]\.\d{8}$/,
    "a sign or blank, a point and eight digits",
  ),
  meanMotionDdot: field(
    "second derivative of the mean motion",
    45,
    52,
    EXPONENT,
    "a form such as 12345-4 after a sign or blank",
  ),
  bstar: field("drag term", 54, 61, EXPONENT, "a form such as 12345-4 after a sign or blank"),
  ephemerisType: field("ephemeris type", 63, 63, /^[0-9 ]$/, "0"),
  elementSet: field("element set number", 65, 68, /^ *\d+$/, "up to four digits, right-aligned"),
} as const;

/** The columns of line 2. */
export const LINE2 = {
  lineNumber: field("line number", 1, 1, /^2$/, "2"),
  catalogNumber: field(
    "catalogue number",
    3,
    7,
    /^[0-9A-Z]\d{4}$/,
    "five digits, or a letter and four digits",
  ),
  inclination: field("inclination", 9, 16, ANGLE, "degrees as DDD.DDDD"),
  raan: field("right ascension of the ascending node", 18, 25, ANGLE, "degrees as DDD.DDDD"),
  eccentricity: field("eccentricity", 27, 33, /^\d{7}$/, "seven digits"),
  argPericenter: field("argument of pericentre", 35, 42, ANGLE, "degrees as DDD.DDDD"),
  meanAnomaly: field("mean anomaly", 44, 51, ANGLE, "degrees as DDD.DDDD"),
  meanMotion: field("mean motion", 53, 63, /^[ 0-9]\d\.\d{8}$/, "revolutions a day as DD.DDDDDDDD"),
  revolution: field("revolution number", 64, 68, /^ *\d+$/, "up to five digits, right-aligned"),
} as const;

/** Columns that hold a blank on each line. */
export const BLANKS1: readonly number[] = [2, 9, 18, 33, 44, 53, 62, 64];
export const BLANKS2: readonly number[] = [2, 8, 17, 26, 34, 43, 52];

/** The text of a field; shorter than the field where the line ends early. */
export function textOf(line: string, f: TleField): string {
  return line.slice(f.from - 1, f.to);
}

/** The number of a field with a decimal point. "-.00000000" gives 0, never -0: no form can carry that sign further. */
export function readDecimal(text: string): number {
  return Number(text) + 0;
}

/** The number of an exponent field: " 12345-4" is 0.12345e-4. The form must have been checked. */
export function readExponent(text: string): number {
  const sign = text.startsWith("-") ? "-" : "";
  return readDecimal(`${sign}0.${text.slice(1, 6)}e${text.slice(6)}`);
}
