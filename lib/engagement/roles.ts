/** Who acts; made by the sign-in, a token, an answer link or a job, and read anew on each request. */
export interface Actor {
  readonly id: string | null;
  readonly name: string;
  readonly role: "planner" | "operator" | "coordinator" | "administrator" | "authority by link" | "system";
  readonly authorityId: string | null;
  readonly isSafetyOfficer: boolean;
  readonly via: "screen" | "token" | "link" | "system";
}

/** Everything that can be asked of the book; the table below says who may. */
export type Right =
  | "search passes"
  | "estimate"
  | "import elements"
  | "propose"
  | "move own"
  | "confirm"
  | "second confirmation"
  | "scrub own"
  | "scrub any"
  | "record firing"
  | "answer notices"
  | "see all notices"
  | "see own notices"
  | "read book"
  | "read ledger"
  | "manage people";

/** The table of rights. A cell that is not here is a refusal. */
export const RIGHTS: Readonly<Record<Actor["role"], readonly Right[]>> = {
  planner: [
    "search passes",
    "estimate",
    "import elements",
    "propose",
    "move own",
    "scrub own",
    "see all notices",
    "read book",
    "read ledger",
  ],
  operator: [
    "search passes",
    "estimate",
    "confirm",
    "scrub any",
    "record firing",
    "see all notices",
    "read book",
    "read ledger",
  ],
  coordinator: ["answer notices", "see own notices"],
  administrator: [
    "search passes",
    "estimate",
    "import elements",
    "second confirmation",
    "see all notices",
    "read book",
    "read ledger",
    "manage people",
  ],
  "authority by link": ["answer notices"],
  system: [],
};

/** True when the table grants the right. */
export function may(actor: Actor, right: Right): boolean {
  return RIGHTS[actor.role].includes(right);
}
