const signs = { "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;", "'": "&#39;" };

/**
 * Makes any text harmless in HTML, in element content and in quoted attributes.
 * @param {unknown} text
 */
export function escapeHtml(text) {
  return String(text ?? "").replace(/[&<>"']/g, (sign) => signs[sign]);
}

/**
 * A plain text as HTML in which web addresses can be followed. Only http and https become links.
 * @param {string} text
 */
export function withLinks(text) {
  return text
    .split(/(https?:\/\/[^\s<>"']+)/)
    .map((piece, at) => (at % 2 === 0 ? escapeHtml(piece) : linkOf(piece)))
    .join("");
}

function linkOf(piece) {
  // A full stop or bracket after an address belongs to the sentence.
  const address = piece.replace(/[.,;:!?)\]]+$/, "");
  const rest = piece.slice(address.length);
  const href = escapeHtml(address);
  return `<a href="${href}" target="_blank" rel="noopener noreferrer">${href}</a>${escapeHtml(rest)}`;
}

/**
 * A time as 2031-04-06 03:12:45Z.
 * @param {string} iso
 */
export function utc(iso) {
  return `${iso.slice(0, 10)} ${iso.slice(11, 19)}Z`;
}

/**
 * A number of bytes for people.
 * @param {number} bytes
 */
export function size(bytes) {
  return bytes < 1_000 ? `${bytes} B` : `${(bytes / 1_000).toFixed(1)} kB`;
}
