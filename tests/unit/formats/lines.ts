/**
 * Vanguard 1 as published by CelesTrak in October 2020, quoted in the tests of
 * python-sgp4 2.15 (file tests.py, MIT licence).
 */
export const NAME = "VANGUARD 1";
export const LINE1 = "1 00005U 58002B   20287.20333880 -.00000016  00000-0 -22483-4 0  9998";
export const LINE2 = "2 00005  34.2443 225.5254 1845686 162.2516 205.2356 10.84869164218149";

/** The same object and epoch as an OMM, as published there. */
export const OMM: Readonly<Record<string, string | number>> = {
  OBJECT_NAME: "VANGUARD 1",
  OBJECT_ID: "1958-002B",
  EPOCH: "2020-10-13T04:52:48.472320",
  MEAN_MOTION: 10.84869164,
  ECCENTRICITY: 0.1845686,
  INCLINATION: 34.2443,
  RA_OF_ASC_NODE: 225.5254,
  ARG_OF_PERICENTER: 162.2516,
  MEAN_ANOMALY: 205.2356,
  EPHEMERIS_TYPE: 0,
  CLASSIFICATION_TYPE: "U",
  NORAD_CAT_ID: 5,
  ELEMENT_SET_NO: 999,
  REV_AT_EPOCH: 21814,
  BSTAR: -0.22483e-4,
  MEAN_MOTION_DOT: -1.6e-7,
  MEAN_MOTION_DDOT: 0,
};

/** A line with `text` written from a 1-based column on. */
export function put(line: string, column: number, text: string): string {
  return line.slice(0, column - 1) + text + line.slice(column - 1 + text.length);
}

/** A line with the right checksum in column 69: digits count themselves, minus signs one. */
export function sealed(line: string): string {
  const sum = Array.from(line.slice(0, 68)).reduce((total, c) => {
    if (c === "-") return total + 1;
    return /\d/.test(c) ? total + Number.parseInt(c, 10) : total;
  }, 0);
  return put(line, 69, String(sum % 10));
}

/** `put`, with the checksum made right again. */
export function putSealed(line: string, column: number, text: string): string {
  return sealed(put(line, column, text));
}
