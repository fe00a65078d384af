import type { Letter } from "./letter";

/** The letter as plain text, for readers without HTML and for everybody's search. */
export function composeText(letter: Letter): string {
  const width = Math.max(...letter.rows.map(([label]) => label.length));
  const rows = letter.rows.map(([label, value]) => `${`${label}:`.padEnd(width + 2)}${value}`);
  const ask = letter.ask ? [letter.ask.words, `Answer by ${letter.ask.by}, here:`, letter.ask.link, ""] : [];
  const lines = [letter.heading, "", ...letter.opening, "", ...rows, "", ...ask, ...letter.cautions, ""];
  return lines.join("\n");
}
