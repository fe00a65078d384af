import { database } from "@/db/client";
import { newestSetsOfProtected, protectedRows } from "@/db/queries/objects";
import type { ProtectedListBody, ProtectedObjectBody } from "@/lib/contracts/protected";
import type { Actor } from "@/lib/engagement/roles";
import {
  halfAngleOf,
  isUsableSet,
  KEEP_OUT,
  PROTECTED_CLASSES,
  protectedClassNamed,
  TIMING_GUARD_S,
  USABLE_SET_DAYS,
} from "@/lib/planning/keep-out";
import { mustReadBook } from "./must-read-book";
import { newestSetBody } from "./newest-set-body";

type Row = Awaited<ReturnType<typeof protectedRows>>[number];
type NewestSet = Awaited<ReturnType<typeof newestSetsOfProtected>>[number];

/** The protected objects by class, with what is kept free around each and the age of its element set. */
export async function listProtected(actor: Actor, nowMs: number): Promise<ProtectedListBody> {
  mustReadBook(actor);
  const q = database();
  const newest = new Map((await newestSetsOfProtected(q)).map((set) => [set.ownerId, set]));
  const rows = await protectedRows(q);
  const objects = rows.map((row) => protectedBody(row, newest.get(row.object.id), nowMs));
  return {
    classes: PROTECTED_CLASSES.map((name) => {
      const members = objects.filter((object) => object.class === name);
      return {
        class: name,
        count: members.length,
        unusableCount: members.filter((object) => !object.usable).length,
        halfAngleDeg: KEEP_OUT[name].halfAngleDeg,
        halfAngleSource: KEEP_OUT[name].source,
      };
    }),
    objects,
    usableSetDays: USABLE_SET_DAYS,
    timingGuardS: TIMING_GUARD_S,
  };
}

function protectedBody(row: Row, set: NewestSet | undefined, nowMs: number): ProtectedObjectBody {
  const { object, ownerName } = row;
  const known = protectedClassNamed(object.class) ?? "crewed";
  return {
    id: object.id,
    name: object.name,
    catalogNumber: object.catalogNumber,
    class: object.class,
    halfAngleDeg: halfAngleOf(known, object.halfAngleDeg),
    halfAngleSource: object.halfAngleDeg === null ? KEEP_OUT[known].source : "the object's own record",
    ownerName,
    version: object.version,
    newestSet: newestSetBody(set, nowMs),
    usable: set !== undefined && isUsableSet(set.epochAt.getTime(), nowMs),
  };
}
