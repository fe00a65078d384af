/** What the ledger's form was filled with, and what of it can be asked. */
export interface LedgerSearch {
  readonly text: string;
  readonly actor: string;
  readonly subjectKind: string;
  readonly subjectId: string;
  readonly from: string;
  readonly to: string;
  readonly before: string;
  /** Words for a time that can't be read; that filter is then left out. */
  readonly fromProblem: string | null;
  readonly toProblem: string | null;
}

type Params = Readonly<Record<string, string | string[] | undefined>>;

/** Reads the address; a repeated parameter counts once. */
export function readLedgerSearch(params: Params): LedgerSearch {
  const one = (name: string) => {
    const value = params[name];
    return (Array.isArray(value) ? (value[0] ?? "") : (value ?? "")).trim().slice(0, 100);
  };
  const [from, to] = [one("from"), one("to")];
  return {
    text: one("text"),
    actor: one("actor"),
    subjectKind: one("subjectKind"),
    subjectId: one("subjectId"),
    from,
    to,
    before: one("before"),
    fromProblem: problemOf(from),
    toProblem: problemOf(to),
  };
}

/** The query for the ledger's service: only what is filled in and can be read. */
export function ledgerQueryOf(search: LedgerSearch): Record<string, string> {
  const { text, actor, subjectKind, subjectId } = search;
  const before = /^[1-9]\d{0,14}$/.test(search.before) ? search.before : "";
  const times = { from: instantOf(search.from) ?? "", to: instantOf(search.to) ?? "" };
  const filled = Object.entries({ text, actor, subjectKind, subjectId, before, ...times });
  return Object.fromEntries(filled.filter(([, value]) => value !== ""));
}

/** The address of the next, older page. */
export function olderPath(search: LedgerSearch, before: number): string {
  const { text, actor, subjectKind, subjectId, from, to } = search;
  const filled = Object.entries({ text, actor, subjectKind, subjectId, from, to }).filter(
    ([, value]) => value !== "",
  );
  return `/ledger?${new URLSearchParams([...filled, ["before", String(before)]])}`;
}

/** `2031-04-06`, `2031-04-06 03:12` or `2031-04-06 03:12:45Z` as ISO 8601; null when it is none of them. */
export function instantOf(words: string): string | null {
  const parts = /^(\d{4}-\d\d-\d\d)(?:[ T](\d\d:\d\d)(?::(\d\d)(?:\.\d{1,3})?)?)?\s*Z?$/i.exec(words);
  if (!parts) return null;
  const [, day = "", minutes = "00:00", seconds = "00"] = parts;
  const ms = Date.parse(`${day}T${minutes}:${seconds}.000Z`);
  const iso = Number.isFinite(ms) ? new Date(ms).toISOString() : "";
  // A 31st of February would come back as another day.
  return iso.startsWith(day) ? iso : null;
}

function problemOf(words: string): string | null {
  if (words === "" || instantOf(words) !== null) return null;
  return "write a UTC time like 2031-04-06 03:12:45Z";
}
