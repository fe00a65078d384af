import type { Letter } from "./letter";

const FONT = "font-family:system-ui,-apple-system,'Segoe UI',Roboto,Helvetica,Arial,sans-serif";
const INK = "color:#14202b";
const QUIET = "color:#4a5a68";

/**
 * The letter as HTML: one column that fits a phone, styles on the elements
 * (mail readers drop style sheets), no picture and nothing fetched from outside.
 */
export function composeHtml(letter: Letter): string {
  const opening = letter.opening.map((words) => paragraph(words, INK)).join("");
  const cautions = letter.cautions.map((words) => paragraph(words, `${QUIET};font-size:14px`)).join("");
  return [
    '<!doctype html><html lang="en"><head><meta charset="utf-8">',
    '<meta name="viewport" content="width=device-width,initial-scale=1">',
    `<title>${escapeHtml(letter.subject)}</title></head>`,
    `<body style="margin:0;padding:16px;background:#f4f6f8;${FONT};font-size:16px;line-height:1.5;${INK}">`,
    '<div style="max-width:600px;margin:0 auto;padding:20px;background:#ffffff;border:1px solid #d4dbe1">',
    `<h1 style="margin:0 0 12px;font-size:20px;line-height:1.3">${escapeHtml(letter.heading)}</h1>`,
    opening,
    rowsHtml(letter.rows),
    askHtml(letter.ask),
    `<hr style="border:0;border-top:1px solid #d4dbe1;margin:20px 0 12px">${cautions}`,
    "</div></body></html>",
  ].join("\n");
}

function paragraph(words: string, style: string): string {
  return `<p style="margin:0 0 10px;${style}">${escapeHtml(words)}</p>`;
}

/** Label above value: two columns are too narrow on a phone. */
function rowsHtml(rows: Letter["rows"]): string {
  const cells = rows.map(
    ([label, value]) =>
      `<tr><td style="padding:8px 0;border-top:1px solid #e6ebef;vertical-align:top">` +
      `<div style="font-size:13px;${QUIET}">${escapeHtml(label)}</div>` +
      `<div style="overflow-wrap:anywhere">${escapeHtml(value)}</div></td></tr>`,
  );
  const style = "width:100%;border-collapse:collapse;margin:12px 0";
  return `<table role="presentation" style="${style}"><tbody>${cells.join("")}</tbody></table>`;
}

function askHtml(ask: Letter["ask"]): string {
  if (ask === null) return "";
  const href = escapeHtml(ask.link);
  const button =
    "display:inline-block;padding:12px 20px;background:#14506e;color:#ffffff;text-decoration:none;font-weight:600";
  return [
    paragraph(ask.words, INK),
    `<p style="margin:0 0 14px"><strong>Answer by ${escapeHtml(ask.by)}</strong></p>`,
    `<p style="margin:0 0 10px"><a href="${href}" style="${button}">Answer this notice</a></p>`,
    `<p style="margin:0 0 10px;font-size:13px;${QUIET};overflow-wrap:anywhere">${href}</p>`,
  ].join("");
}

/** Text as it may stand in HTML, in an element or in a quoted attribute. */
export function escapeHtml(text: string): string {
  return text
    .replaceAll("&", "&amp;")
    .replaceAll("<", "&lt;")
    .replaceAll(">", "&gt;")
    .replaceAll('"', "&quot;")
    .replaceAll("'", "&#39;");
}
