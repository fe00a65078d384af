/**
 * Modulo-10 checksum of a TLE line over its first 68 columns: the sum of all
 * digits, one for every minus sign, nothing for any other character.
 */
export function tleChecksum(line: string): number {
  let sum = 0;
  for (const c of line.slice(0, 68)) {
    if (c >= "0" && c <= "9") sum += Number(c);
    else if (c === "-") sum += 1;
  }
  return sum % 10;
}
