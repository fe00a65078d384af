import { z } from "zod";

export const tokenInput = z.strictObject({
  /** What the token is for, in the owner's words. */
  label: z.string().trim().min(1, { error: "say what the token is for" }).max(80),
});

/** A personal access token in a list; the token itself is never shown again. */
export interface TokenBody {
  readonly id: string;
  readonly label: string;
  readonly createdAt: string;
  readonly lastUsedAt: string | null;
}

/** The one answer that holds the token itself. */
export interface NewTokenBody extends TokenBody {
  readonly token: string;
}

export const passwordInput = z.strictObject({
  current: z.string().min(1).max(200),
  next: z.string().min(1).max(200),
});
