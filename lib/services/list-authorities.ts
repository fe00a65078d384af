import { database } from "@/db/client";
import { authorityRows, openNoticeCounts, stationRows } from "@/db/queries/stations";
import type { AuthorityBody } from "@/lib/contracts/authorities";
import type { Actor } from "@/lib/engagement/roles";
import { mustReadBook } from "./must-read-book";

/** Every authority with its contacts, hours, deadlines and what waits for its answer, by name. */
export async function listAuthorities(actor: Actor): Promise<{ authorities: AuthorityBody[] }> {
  mustReadBook(actor);
  const q = database();
  const { authorities, volumes, coordinators } = await authorityRows(q);
  const { links } = await stationRows(q);
  const open = new Map((await openNoticeCounts(q)).map((row) => [row.authorityId, row.count]));
  const bodies = authorities.map((authority) => ({
    ...authority,
    stations: links
      .filter((link) => link.authorityId === authority.id)
      .map((link) => ({ id: link.stationId, name: link.stationName })),
    volumes: volumes
      .filter((volume) => volume.authorityId === authority.id)
      .map(({ id, name }) => ({ id, name })),
    coordinators: coordinators
      .filter((person) => person.authorityId === authority.id)
      .map((person) => person.name),
    openNotices: open.get(authority.id) ?? 0,
  }));
  return { authorities: bodies };
}
