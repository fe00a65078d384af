import { z } from "zod";
import { identifierText, ROLES, type Role } from "./common";

/** Why, in a few words: it stands in the ledger. */
const reason = z.string().trim().min(1, { error: "give a reason" }).max(300);

/** A change by an administrator. What is left out stays as it is. */
export const personChangeInput = z.strictObject({
  role: z.enum(ROLES).optional(),
  /** The authority a coordinator answers for; null for every other role. */
  authorityId: identifierText.nullish(),
  isSafetyOfficer: z.boolean().optional(),
  active: z.boolean().optional(),
  reason,
});
export type PersonChange = z.infer<typeof personChangeInput>;

export const endSessionsInput = z.strictObject({ reason });

/** A person as administrators see them. */
export interface PersonBody {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly isSafetyOfficer: boolean;
  readonly authorityId: string | null;
  readonly authorityName: string | null;
  readonly active: boolean;
  readonly liveTokens: number;
  readonly createdAt: string;
}
