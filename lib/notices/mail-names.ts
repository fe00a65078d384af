/** A mailbox with its name, as in "Dwellbook <book@dwellbook.invalid>". */
export interface Mailbox {
  readonly name: string;
  readonly email: string;
}

/** Reads `Name <address>` or a bare address; the name falls back to the address. */
export function readMailbox(text: string): Mailbox {
  const match = /^\s*"?([^"<]*?)"?\s*<([^<>\s]+)>\s*$/.exec(text);
  const email = (match?.[2] ?? text).trim();
  const name = match?.[1]?.trim();
  return { name: name ? name : email, email };
}

/** The right-hand side of our Message-IDs: the host of the product's address when it has a name. */
export function mailDomain(baseUrl: string): string {
  const host = URL.canParse(baseUrl) ? new URL(baseUrl).hostname : "";
  return /^(?=.*[a-z])[a-z0-9-]+(\.[a-z0-9-]+)+$/i.test(host) ? host : "dwellbook.invalid";
}

/** The Message-ID of a notice: the same on every attempt, so that a repeat is recognised. */
export function messageIdOf(noticeId: string, baseUrl: string): string {
  return `<${noticeId}@${mailDomain(baseUrl)}>`;
}
