import { z } from "zod";
import type { Elements } from "@/lib/physics/orbit/elements";
import { identifierText } from "./common";

/** The report of POST /api/element-sets. */
export interface ImportReportBody {
  readonly accepted: number;
  readonly rejected: readonly { readonly line: number; readonly column: number; readonly message: string }[];
  /** Sets that are already stored, by line. */
  readonly duplicates: readonly {
    readonly line: number;
    readonly catalogNumber: number;
    readonly message: string;
  }[];
  /** Sets that are stored but older than the newest of their object. */
  readonly older: readonly {
    readonly line: number;
    readonly catalogNumber: number;
    readonly message: string;
  }[];
  /** Objects that were new to the book. */
  readonly created: readonly { readonly catalogNumber: number; readonly name: string }[];
  readonly preview: boolean;
  readonly importId: string | null;
  /** The sweep that follows, so that the screen can show its progress. */
  readonly sweepId: string | null;
}

/** GET /api/element-sets: the history of one object, or the newest set of every object. */
export const elementSetQuery = z.strictObject({
  fragment: identifierText.optional(),
  protected: identifierText.optional(),
  catalogNumber: z.coerce.number().int().min(1).max(999_999_999).optional(),
});

/** How a text is imported. */
export const importOptions = z
  .strictObject({
    as: z.enum(["fragments", "protected"]).default("fragments"),
    /** The class of protected objects that are new. */
    class: z.enum(["crewed", "payload", "optical payload", "own"]).optional(),
    preview: z.boolean().default(false),
  })
  .superRefine((value, ctx) => {
    if (value.as === "protected" && value.class === undefined) {
      ctx.addIssue({ code: "custom", path: ["class"], message: "protected objects need their class" });
    }
  });
export type ImportOptions = z.infer<typeof importOptions>;

/** One stored element set: the elements with their names and units, and where they come from. */
export interface ElementSetBody extends Elements {
  readonly id: string;
  readonly fragmentId: string | null;
  readonly protectedObjectId: string | null;
  /** The import that brought it; null for what came another way. */
  readonly importId: string | null;
  /** The epoch to the millisecond; `epochMs` keeps microseconds. */
  readonly epochAt: string;
  readonly format: string;
  readonly raw: string;
  readonly source: string;
  readonly importedAt: string;
}
