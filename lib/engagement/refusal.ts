/** One reason, with the field or rule it is about. */
export interface Reason {
  readonly path: string;
  readonly message: string;
}

/** What a service throws when it will not do what was asked; handlers turn it into a status. */
export class Refusal extends Error {
  readonly status: 400 | 401 | 403 | 404 | 409 | 413 | 422 | 429;
  readonly code: string;
  readonly reasons: readonly Reason[];

  constructor(status: Refusal["status"], code: string, message: string, reasons: readonly Reason[] = []) {
    super(message);
    this.name = "Refusal";
    this.status = status;
    this.code = code;
    this.reasons = reasons;
  }
}

/** No valid sign-in or token. */
export function unknownCaller(): Refusal {
  return new Refusal(401, "unauthenticated", "Sign in, or send a valid access token.");
}

/** Signed in, but the table of rights says no. */
export function notAllowed(what: string): Refusal {
  return new Refusal(403, "forbidden", `Your role does not allow this: ${what}.`);
}

/** A body that cannot be read at all. */
export function unreadable(message: string, reasons: readonly Reason[] = []): Refusal {
  return new Refusal(400, "invalid", message, reasons);
}

/** Nothing under that identifier, or nothing this caller may know of. */
export function notFound(what: string): Refusal {
  return new Refusal(404, "not_found", `There is no such ${what}.`);
}

/** Somebody else holds it. */
export function conflict(message: string, reasons: readonly Reason[] = []): Refusal {
  return new Refusal(409, "conflict", message, reasons);
}

/** Readable and allowed, but the rules say no; all reasons at once. */
export function refused(message: string, reasons: readonly Reason[]): Refusal {
  return new Refusal(422, "refused", message, reasons);
}
