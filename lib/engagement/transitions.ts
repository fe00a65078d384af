import type { Right } from "./roles";
import type { EngagementState } from "./states";

/** What people ask of a booked engagement, and what the book does by itself. */
export type Command =
  | "move"
  | "answer"
  | "object"
  | "confirm"
  | "scrub"
  | "fire"
  | "clear"
  | "reopen"
  | "lapse";

/** A right of the table of rights, or the book itself. */
export type Who = Right | "the book";

/** What must be so beside the state; each is one function in needs.ts. */
export type Need =
  | "before the dwell"
  | "after the dwell's start"
  | "outside every change deadline"
  | "nothing closed"
  | "nothing pending"
  | "every answer in"
  | "attested where not checked"
  | "an operator's name first"
  | "a second person's name"
  | "a reason"
  | "time has run out";

/** One legal step. Two rows of the same state and command differ in what they need. */
export interface Transition {
  readonly state: EngagementState;
  readonly command: Command;
  readonly next: EngagementState;
  readonly who: readonly Who[];
  readonly needs: readonly Need[];
}

const MOVE: Pick<Transition, "command" | "next" | "who" | "needs"> = {
  command: "move",
  next: "proposed",
  who: ["move own"],
  needs: ["before the dwell", "outside every change deadline"],
};

const SCRUB: Pick<Transition, "command" | "next" | "who" | "needs"> = {
  command: "scrub",
  next: "scrubbed",
  who: ["scrub any", "scrub own"],
  needs: ["a reason"],
};

const OBJECT: Pick<Transition, "command" | "next" | "who" | "needs"> = {
  command: "object",
  next: "proposed",
  who: ["answer notices"],
  needs: ["before the dwell"],
};

const ANSWER: Pick<Transition, "command" | "who" | "needs"> = {
  command: "answer",
  who: ["answer notices"],
  needs: ["before the dwell"],
};

const REOPEN: Pick<Transition, "command" | "next" | "who" | "needs"> = {
  command: "reopen",
  next: "proposed",
  who: ["the book"],
  needs: ["before the dwell"],
};

const LAPSE: Pick<Transition, "command" | "next" | "who" | "needs"> = {
  command: "lapse",
  next: "lapsed",
  who: ["the book"],
  needs: ["time has run out"],
};

const STANDS: readonly Need[] = ["before the dwell", "nothing closed", "nothing pending", "every answer in"];

/** Every legal step of a booked engagement. What is not here is refused, here and in the database. */
export const TRANSITIONS: readonly Transition[] = [
  { state: "proposed", ...MOVE },
  { state: "cleared", ...MOVE },
  { state: "confirmed", ...MOVE },
  { state: "proposed", ...ANSWER, next: "proposed" },
  { state: "cleared", ...ANSWER, next: "cleared" },
  { state: "confirmed", ...ANSWER, next: "confirmed" },
  { state: "proposed", ...OBJECT },
  { state: "cleared", ...OBJECT },
  { state: "confirmed", ...OBJECT },
  { state: "proposed", command: "clear", next: "cleared", who: ["the book"], needs: STANDS },
  { state: "cleared", ...REOPEN },
  { state: "confirmed", ...REOPEN },
  {
    state: "cleared",
    command: "confirm",
    next: "cleared",
    who: ["confirm", "second confirmation"],
    needs: [...STANDS, "attested where not checked", "an operator's name first"],
  },
  {
    state: "cleared",
    command: "confirm",
    next: "confirmed",
    who: ["confirm", "second confirmation"],
    needs: [...STANDS, "attested where not checked", "a second person's name"],
  },
  { state: "proposed", ...SCRUB },
  { state: "cleared", ...SCRUB },
  { state: "confirmed", ...SCRUB },
  {
    state: "confirmed",
    command: "fire",
    next: "fired",
    who: ["record firing"],
    needs: ["after the dwell's start"],
  },
  { state: "proposed", ...LAPSE },
  { state: "cleared", ...LAPSE },
];
