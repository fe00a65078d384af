/** Alpha-5 letters in order; I and O are left out because they read as 1 and 0. A is 10, Z is 33. */
const ALPHA5 = "ABCDEFGHJKLMNPQRSTUVWXYZ";

/** Largest catalogue number of an OMM: nine digits. */
export const MAX_CATALOG_NUMBER = 999_999_999;

/**
 * The catalogue number in a five-column TLE field: five digits, or a letter and
 * four digits (Alpha-5, up to 339999). Null when it has neither form or is zero.
 */
export function readTleCatalogNumber(field: string): number | null {
  if (!/^[0-9A-Z][0-9]{4}$/.test(field)) return null;
  const lead = field.charAt(0);
  const letter = ALPHA5.indexOf(lead);
  if (letter < 0 && !/[0-9]/.test(lead)) return null;
  const high = letter < 0 ? Number(lead) : letter + 10;
  const value = high * 10_000 + Number(field.slice(1));
  return value > 0 ? value : null;
}
