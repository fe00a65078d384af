import { CLEARING_DESK, CORVANE_AIR } from "./authorities";

/** An invented person; passwords and tokens are made at random for each installation. */
export interface InventedPerson {
  readonly name: string;
  readonly email: string;
  readonly role: "planner" | "operator" | "coordinator" | "administrator";
  readonly isSafetyOfficer: boolean;
  readonly authority: string | null;
}

export const INVENTED_PEOPLE: readonly InventedPerson[] = [
  {
    name: "Ines Varga",
    email: "ines@dwellbook.invalid",
    role: "planner",
    isSafetyOfficer: false,
    authority: null,
  },
  {
    name: "Tomas Lind",
    email: "tomas@dwellbook.invalid",
    role: "operator",
    isSafetyOfficer: false,
    authority: null,
  },
  {
    name: "Ruth Okello",
    email: "ruth@dwellbook.invalid",
    role: "operator",
    isSafetyOfficer: false,
    authority: null,
  },
  {
    name: "Maren Holt",
    email: "maren@brightwater.invalid",
    role: "coordinator",
    isSafetyOfficer: false,
    authority: CLEARING_DESK,
  },
  {
    name: "Pavel Dorn",
    email: "pavel@dwellbook.invalid",
    role: "administrator",
    isSafetyOfficer: true,
    authority: null,
  },
  {
    name: "Lucía Ferrán",
    email: "lucia@corvane-approach.invalid",
    role: "coordinator",
    isSafetyOfficer: false,
    authority: CORVANE_AIR,
  },
];
