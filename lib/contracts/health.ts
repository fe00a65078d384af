/** GET /api/health: ok only when the database, a worker and the mail server answer. */
export interface HealthBody {
  readonly status: "ok" | "degraded";
  readonly database: "ok" | "unreachable";
  readonly workers: { readonly alive: number; readonly oldestHeartbeatS: number | null };
  readonly mail: "ok" | "unreachable";
}
