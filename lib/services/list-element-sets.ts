import { database } from "@/db/client";
import { type ElementSetRow, listSets } from "@/db/queries/element-sets";
import { type ElementSetBody, elementSetQuery } from "@/lib/contracts/element-sets";
import { notAllowed } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";

/** The history of one object, newest first; without a filter the newest set of every object. */
export async function listElementSets(
  actor: Actor,
  query: unknown,
): Promise<{ elementSets: ElementSetBody[] }> {
  if (!may(actor, "read book")) throw notAllowed("read element sets");
  const wanted = elementSetQuery.parse(query);
  const rows = await listSets(database(), {
    ...(wanted.fragment === undefined ? {} : { fragmentId: wanted.fragment }),
    ...(wanted.protected === undefined ? {} : { protectedObjectId: wanted.protected }),
    ...(wanted.catalogNumber === undefined ? {} : { catalogNumber: wanted.catalogNumber }),
  });
  return { elementSets: rows.map(elementSetBody) };
}

function elementSetBody({ epochAt, importedAt, ...rest }: ElementSetRow): ElementSetBody {
  return { ...rest, epochAt: epochAt.toISOString(), importedAt: importedAt.toISOString() };
}
