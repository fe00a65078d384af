import { utcShort } from "@/app/_format/utc";
import type { NoticeBody } from "@/lib/contracts/engagements";

/** Whether the mail went out, in words; a failure with what the mail server said. */
export function deliveryWords(n: NoticeBody): string {
  if (n.delivery === "sent") return n.sentAt ? `sent ${utcShort(n.sentAt)}` : "sent";
  const tries = n.attempts === 1 ? "1 try" : `${n.attempts} tries`;
  if (n.delivery === "failed") return `not delivered after ${tries}: ${n.lastError ?? "no reason was given"}`;
  if (n.attempts > 0) return `waits for the next try after ${tries}: ${n.lastError ?? "no reason was given"}`;
  return "waits to be sent";
}

/** Whether it still asks something: a request that nothing has replaced, of a live engagement without an answer. */
export function isWaiting(n: NoticeBody): boolean {
  return asks(n) && n.answer === null;
}

/** A request in force about an engagement that is still alive. */
export function asks(n: NoticeBody): boolean {
  const live = ["proposed", "cleared", "confirmed"].includes(n.engagementState);
  return live && !n.superseded && (n.kind === "request" || n.kind === "revised request");
}
