import { capacity } from "./store.mjs";
import { escapeHtml, size, utc, withLinks } from "./text.mjs";

/** Mails on one page of the list. */
export const pageLength = 100;

function frame(title, bookUrl, body) {
  const book = bookUrl ? `<a class="book" href="${escapeHtml(bookUrl)}">Open Dwellbook</a>` : "";
  return `<!doctype html><html lang="en"><head><meta charset="utf-8">
<meta name="viewport" content="width=device-width,initial-scale=1"><meta name="referrer" content="no-referrer">
<title>${escapeHtml(title)} · Dwellbook mail fake</title><link rel="icon" href="data:,"><link rel="stylesheet" href="/style.css"></head><body>
<header><a class="mark" href="/">Dwellbook</a><span class="what">mail fake</span>${book}</header>
<p class="note">This is the demo’s local mail fake. Every mail that Dwellbook sends ends here; nothing leaves this machine.</p>
<main>${body}</main></body></html>`;
}

const subjectOf = (mail) => (mail.subject.trim() === "" ? "(no subject)" : mail.subject);

function tagsOf(mail) {
  const method = mail.method
    ? `<span class="tag" data-method="${escapeHtml(mail.method)}">calendar ${escapeHtml(mail.method)}</span>`
    : "";
  const again = mail.again ? '<span class="tag again">same Message-ID as an earlier one</span>' : "";
  return `<span class="tags">${method}${again}</span>`;
}

function listItem(mail) {
  return `<li><time class="n" datetime="${escapeHtml(mail.receivedAt)}">${utc(mail.receivedAt)}</time>
<span><a href="/messages/${mail.id}">${escapeHtml(subjectOf(mail))}</a><br><span class="to">to ${escapeHtml(mail.to.join(", "))}</span></span>
${tagsOf(mail)}</li>`;
}

function emptyList(words) {
  const text =
    words === ""
      ? '<p><b>No mail yet.</b></p><p class="quiet">Book a dwell or scrub one in Dwellbook: its notices show up here a moment later.</p>'
      : `<p><b>No mail matches “${escapeHtml(words)}”.</b></p><p><a href="/">Show all mail</a></p>`;
  return `<div class="sheet none">${text}</div>`;
}

function turning(start, total, words) {
  const link = (from, text) => `<a href="/?from=${from}&amp;q=${encodeURIComponent(words)}">${text}</a>`;
  const newer = start > 0 ? link(Math.max(0, start - pageLength), "Newer") : "<span></span>";
  const older = start + pageLength < total ? link(start + pageLength, "Older") : "<span></span>";
  return total > pageLength ? `<nav class="turn" aria-label="Pages of mail">${newer}${older}</nav>` : "";
}

/**
 * The list of mails, newest first.
 * @param {{ mails: readonly any[], start: number, words: string, bookUrl: string | undefined }} view
 *   mails are those that match the words
 */
export function listPage({ mails, start, words, bookUrl }) {
  const shown = mails.slice(start, start + pageLength);
  const count = mails.length === 1 ? "1 mail" : `${mails.length} mails`;
  const list =
    shown.length > 0 ? `<ol class="mails sheet">${shown.map(listItem).join("")}</ol>` : emptyList(words);
  const body = `<div class="bar"><div><h1>Mail</h1><p>${count}, newest first; the last ${capacity.toLocaleString("en")} are kept. <a href="/">Look again</a></p></div>
<form action="/" role="search"><div><label for="q">Subject or address</label><input id="q" name="q" type="search" value="${escapeHtml(words)}"></div><button>Find</button></form></div>
${list}${turning(start, mails.length, words)}`;
  return frame("Mail", bookUrl, body);
}

function fact(name, value) {
  return value ? `<dt>${name}</dt><dd>${value}</dd>` : "";
}

function attachmentsPart(mail) {
  if (mail.attachments.length === 0) return "";
  const items = mail.attachments.map(
    (one, at) =>
      `<li><a href="/messages/${mail.id}/attachments/${at}" download>${escapeHtml(one.name)}</a> <span class="quiet n">${escapeHtml(one.type)}, ${size(one.bytes)}</span></li>`,
  );
  return `<h2>Attachments</h2><ul class="files sheet">${items.join("")}</ul>`;
}

function headersPart(mail) {
  const lines = Object.entries(mail.headers).flatMap(([name, value]) =>
    [value].flat().map((one) => `${name}: ${one}`),
  );
  return `<h2>As it was sent</h2><details class="sheet"><summary>All headers</summary><pre>${escapeHtml(lines.join("\n"))}</pre></details>
<p><a href="/messages/${mail.id}.eml" download>The raw mail</a> · <a href="/messages/${mail.id}.json">as JSON</a></p>`;
}

/**
 * One mail with all its parts. Its HTML stays in a frame without scripts or an origin.
 * @param {{ mail: any, newer: string | null, older: string | null, bookUrl: string | undefined }} view
 */
export function mailPage({ mail, newer, older, bookUrl }) {
  const turn = (id, text) => (id ? `<a href="/messages/${id}">${text}</a>` : "<span></span>");
  const html = mail.html
    ? `<h2>HTML part</h2><iframe title="HTML part of this mail" sandbox="allow-popups allow-popups-to-escape-sandbox" src="/messages/${mail.id}/html"></iframe>`
    : "";
  const calendar = mail.icalendar
    ? `<h2>Calendar part</h2><div class="sheet"><pre>${escapeHtml(mail.icalendar)}</pre></div>`
    : "";
  const body = `<p><a href="/">All mail</a></p><h1>${escapeHtml(subjectOf(mail))}</h1>${tagsOf(mail)}
<dl class="facts sheet">${fact("From", escapeHtml(mail.from))}${fact("To", escapeHtml(mail.to.join(", ")))}${fact("Received", `<span class="n">${utc(mail.receivedAt)}</span>`)}${fact("Message-ID", `<span class="n">${escapeHtml(mail.messageId)}</span>`)}</dl>
${html}<h2>Text part</h2><div class="sheet"><pre>${mail.text.trim() === "" ? "(empty)" : withLinks(mail.text)}</pre></div>
${calendar}${attachmentsPart(mail)}${headersPart(mail)}
<nav class="turn" aria-label="Other mails">${turn(newer, "Newer mail")}${turn(older, "Older mail")}</nav>`;
  return frame(subjectOf(mail), bookUrl, body);
}

/**
 * A page that says one thing.
 * @param {string} sentence
 * @param {string | undefined} bookUrl
 */
export function sentencePage(sentence, bookUrl) {
  return frame(sentence, bookUrl, `<h1>${escapeHtml(sentence)}</h1><p><a href="/">All mail</a></p>`);
}
