import type { authorities } from "@/db/schema/authorities";

type AuthorityRow = typeof authorities.$inferInsert;

/** An invented airspace volume around a point, as a ring of corners. */
export interface InventedVolume {
  readonly name: string;
  readonly authority: string;
  readonly ring: [number, number][];
  readonly floorText: string;
  readonly ceilingText: string;
  readonly floorM: number;
  readonly ceilingM: number;
  readonly liftable: boolean;
  /** Daily active span in UTC as minutes of the day. */
  readonly daily: { readonly fromMin: number; readonly toMin: number };
}

/** The clearing desk is concerned by every engagement; its lead time leaves room for the next hour. */
export const CLEARING_DESK = "Brightwater Clearing Desk";
export const CORVANE_AIR = "Corvane Approach";

/** Invented authorities in several time zones; .invalid addresses can never be delivered outside. */
export const INVENTED_AUTHORITIES: readonly (AuthorityRow & { name: string })[] = [
  {
    name: CLEARING_DESK,
    kind: "clearing authority",
    email: "desk@brightwater.invalid",
    phone: "+00 555 0100",
    outOfHoursPhone: "+00 555 0101",
    dutyHours: "at all hours",
    timeZone: "Europe/Lisbon",
    leadTimeMin: 20,
    changeDeadlineMin: 15,
  },
  {
    name: CORVANE_AIR,
    kind: "air unit",
    email: "supervisor@corvane-approach.invalid",
    phone: "+00 555 0110",
    outOfHoursPhone: null,
    dutyHours: "at all hours",
    timeZone: "Europe/Madrid",
    leadTimeMin: 30,
    changeDeadlineMin: 30,
  },
  {
    name: "Tessaly Area Control",
    kind: "air unit",
    email: "airspace@tessaly-area.invalid",
    phone: "+00 555 0120",
    outOfHoursPhone: "+00 555 0121",
    dutyHours: "06:00 to 22:00 local",
    timeZone: "Australia/Perth",
    leadTimeMin: 45,
    changeDeadlineMin: 30,
  },
  {
    name: "Marrec Tower",
    kind: "air unit",
    email: "tower@marrec.invalid",
    phone: "+00 555 0130",
    outOfHoursPhone: null,
    dutyHours: "05:00 to 21:00 local",
    timeZone: "Indian/Reunion",
    leadTimeMin: 40,
    changeDeadlineMin: 30,
  },
  {
    name: "Salt Pan Centre",
    kind: "air unit",
    email: "watch@saltpan-centre.invalid",
    phone: "+00 555 0140",
    outOfHoursPhone: "+00 555 0141",
    dutyHours: "at all hours",
    timeZone: "America/Santiago",
    leadTimeMin: 30,
    changeDeadlineMin: 30,
  },
];

/** Corners of a box around a point, closed. */
function box(
  longitudeDeg: number,
  latitudeDeg: number,
  halfWidthDeg: number,
  halfHeightDeg: number,
): [number, number][] {
  const [w, e] = [longitudeDeg - halfWidthDeg, longitudeDeg + halfWidthDeg];
  const [s, n] = [latitudeDeg - halfHeightDeg, latitudeDeg + halfHeightDeg];
  return [
    [w, s],
    [e, s],
    [e, n],
    [w, n],
    [w, s],
  ];
}

const FT = 0.3048;

export const INVENTED_VOLUMES: readonly InventedVolume[] = [
  {
    name: "Corvane air route east",
    authority: CORVANE_AIR,
    ring: box(-2.28, 37.3, 0.08, 0.5),
    floorText: "FL 245",
    ceilingText: "FL 460",
    floorM: Math.round(24_500 * FT),
    ceilingM: Math.round(46_000 * FT),
    liftable: true,
    daily: { fromMin: 4 * 60, toMin: 23 * 60 },
  },
  {
    name: "Tessaly training area",
    authority: "Tessaly Area Control",
    ring: box(118.1, -31.3, 0.09, 0.09),
    floorText: "SFC",
    ceilingText: "FL 300",
    floorM: 0,
    ceilingM: Math.round(30_000 * FT),
    liftable: false,
    daily: { fromMin: 0, toMin: 9 * 60 },
  },
  {
    name: "Marrec terminal area",
    authority: "Marrec Tower",
    ring: box(55.55, -20.95, 0.1, 0.08),
    floorText: "3000 ft AMSL",
    ceilingText: "FL 195",
    floorM: Math.round(3_000 * FT),
    ceilingM: Math.round(19_500 * FT),
    liftable: true,
    daily: { fromMin: 2 * 60, toMin: 18 * 60 },
  },
  {
    name: "Salt Pan upper route",
    authority: "Salt Pan Centre",
    ring: box(-68.15, -23.8, 0.07, 0.6),
    floorText: "FL 290",
    ceilingText: "FL 410",
    floorM: Math.round(29_000 * FT),
    ceilingM: Math.round(41_000 * FT),
    liftable: true,
    daily: { fromMin: 10 * 60, toMin: 4 * 60 },
  },
];
