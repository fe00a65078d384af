import { notAllowed } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";

/** Stations, fragments, airspace and the rest are read by everyone who reads the book. Throws a 403. */
export function mustReadBook(actor: Actor): void {
  if (!may(actor, "read book")) throw notAllowed("read the book");
}
