import { eq } from "drizzle-orm";
import type { Transaction } from "@/db/client";
import { fragments } from "@/db/schema/objects";
import type { InventedFragment } from "./break-up";

/** Gives the imported fragments the bodies that were invented with them. */
export async function fillBodies(tx: Transaction, invented: readonly InventedFragment[]): Promise<void> {
  for (const one of invented) {
    await tx
      .update(fragments)
      .set({
        massKg: one.massKg,
        areaM2: one.areaM2,
        material: one.material,
        shape: "tumbling-plate",
        bodySource: "invented for the demo",
      })
      .where(eq(fragments.catalogNumber, one.orbit.catalogNumber));
  }
}
