import type { NewestSetBody } from "./fragments";

/** A protected object: GET /api/protected. */
export interface ProtectedObjectBody {
  readonly id: string;
  readonly name: string;
  readonly catalogNumber: number;
  readonly class: string;
  /** What is kept free around it, and where the number comes from. */
  readonly halfAngleDeg: number;
  readonly halfAngleSource: string;
  readonly ownerName: string | null;
  readonly version: number;
  readonly newestSet: NewestSetBody | null;
  /** False when no element set is near enough to now to screen with. */
  readonly usable: boolean;
}

/** The protected objects by class, with what screening keeps free. */
export interface ProtectedListBody {
  readonly classes: readonly {
    readonly class: string;
    readonly count: number;
    readonly unusableCount: number;
    readonly halfAngleDeg: number;
    readonly halfAngleSource: string;
  }[];
  readonly objects: readonly ProtectedObjectBody[];
  /** How far from its epoch a set may be used, days. */
  readonly usableSetDays: number;
  readonly timingGuardS: number;
}
