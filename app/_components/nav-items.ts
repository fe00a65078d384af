import { type Actor, may, type Right } from "@/lib/engagement/roles";

export interface NavItem {
  readonly href: string;
  readonly label: string;
  /** Any of these opens the page. */
  readonly rights: readonly Right[];
}

/** Every page in the navigation, in the order of the work. */
export const NAV_ITEMS: readonly NavItem[] = [
  { href: "/calendar", label: "Calendar", rights: ["read book"] },
  { href: "/passes", label: "Passes", rights: ["search passes"] },
  { href: "/fragments", label: "Fragments", rights: ["read book"] },
  { href: "/engagements", label: "Engagements", rights: ["read book"] },
  { href: "/import", label: "Import", rights: ["import elements"] },
  { href: "/notices", label: "Notices", rights: ["see all notices", "see own notices"] },
  { href: "/watch", label: "Watch", rights: ["confirm", "second confirmation", "record firing"] },
  { href: "/stations", label: "Stations", rights: ["read book"] },
  { href: "/airspace", label: "Airspace", rights: ["read book"] },
  { href: "/protected", label: "Protected", rights: ["read book"] },
  { href: "/authorities", label: "Authorities", rights: ["read book"] },
  { href: "/ledger", label: "Ledger", rights: ["read ledger"] },
  { href: "/people", label: "People", rights: ["manage people"] },
];

/** The pages this person may open. */
export function navFor(person: Actor): NavItem[] {
  return NAV_ITEMS.filter((item) => item.rights.some((right) => may(person, right)));
}

/** Where a person's day starts: the first page they may open. */
export function homeFor(person: Actor): string {
  return navFor(person)[0]?.href ?? "/account";
}
