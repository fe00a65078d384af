import { answer, book, castOf, choosePasses, confirm } from "./story";

const HOUR_MS = 3_600_000;
const MINUTE_MS = 60_000;

/** How far the demo's coming engagements have got, in the order of their passes. */
const STAGES = ["confirmed", "one name", "cleared with conditions", "proposed", "proposed"] as const;

/** Books a few coming engagements; the next three hours stay free for the reader's own. */
export async function bookComing(nowMs: number): Promise<void> {
  const cast = await castOf();
  const span = { fromMs: nowMs + 3 * HOUR_MS, toMs: nowMs + 48 * HOUR_MS, nowMs };
  const chosen = await choosePasses(cast, span, STAGES.length);
  for (const [i, pass] of chosen.entries()) {
    const stage = STAGES[i];
    if (!stage) break;
    const id = await book(cast, pass, nowMs);
    if (stage === "proposed") continue;
    const conditions = "Call the desk's duty line 30 min before the start and at completion.";
    const withConditions = stage === "cleared with conditions";
    const reply = withConditions
      ? { outcome: "no objection with conditions", conditions }
      : { outcome: "no objection" };
    await answer(cast, id, reply, nowMs + MINUTE_MS);
    if (withConditions) continue;
    await confirm(cast.operator, id, nowMs + 2 * MINUTE_MS);
    if (stage === "confirmed") await confirm(cast.secondOperator, id, nowMs + 3 * MINUTE_MS);
  }
}
