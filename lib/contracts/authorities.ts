/** An authority with its contacts, hours and deadlines: GET /api/authorities. */
export interface AuthorityBody {
  readonly id: string;
  readonly name: string;
  readonly kind: string;
  readonly email: string;
  readonly phone: string;
  readonly outOfHoursPhone: string | null;
  readonly dutyHours: string;
  readonly timeZone: string;
  readonly leadTimeMin: number;
  readonly changeDeadlineMin: number;
  readonly version: number;
  /** Stations whose every engagement concerns it. */
  readonly stations: readonly { readonly id: string; readonly name: string }[];
  readonly volumes: readonly { readonly id: string; readonly name: string }[];
  readonly coordinators: readonly string[];
  /** Notices that still wait for its answer. */
  readonly openNotices: number;
}
