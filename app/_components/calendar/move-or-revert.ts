import { announce } from "@/app/_client/announce";
import { FetchError, sendJson } from "@/app/_client/fetch-json";
import type { EngagementBody } from "@/lib/contracts/engagements";

/** Sends a move; what the server refuses goes back to where it was, with the reasons in words. */
export async function moveOrRevert(
  e: EngagementBody,
  span: { readonly fromMs: number; readonly toMs: number },
  revert: () => void,
): Promise<void> {
  const [from, to] = [new Date(span.fromMs).toISOString(), new Date(span.toMs).toISOString()];
  try {
    await sendJson<EngagementBody>(`/api/engagements/${e.id}`, "PATCH", { from, to, version: e.version });
    announce(`E-${e.number} is moved; it waits for the answers to the revised notices.`);
  } catch (thrown) {
    revert();
    announce(`E-${e.number} stays where it was. ${wordsOf(thrown)}`, "problem");
  }
}

function wordsOf(thrown: unknown): string {
  if (!(thrown instanceof FetchError)) return "The move failed.";
  const reasons = thrown.details.map((d) => d.message);
  return thrown.status === 422 && reasons.length > 0 ? reasons.join(" ") : thrown.message;
}
