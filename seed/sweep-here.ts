import { and, asc, eq } from "drizzle-orm";
import { database } from "@/db/client";
import { sweepChunks } from "@/db/schema/passes";
import { sweepChunk } from "@/lib/services/sweep-chunk";

/**
 * Works a sweep's chunks off in this process, since the demo books on its passes
 * before any worker runs. The queued jobs find their chunks done and end at once.
 */
export async function sweepHere(sweepId: string, nowMs: number): Promise<void> {
  const waiting = await database()
    .select({ id: sweepChunks.id })
    .from(sweepChunks)
    .where(and(eq(sweepChunks.sweepId, sweepId), eq(sweepChunks.state, "waiting")))
    .orderBy(asc(sweepChunks.id));
  for (const { id } of waiting) await sweepChunk(id, nowMs);
}
