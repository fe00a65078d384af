/** What one side of a comparison took. */
export interface Stopwatch {
  cpuS: number;
}

/** Runs a part and adds its processor time (user and system, all threads of this process) to a stopwatch. */
export function timed<T>(watch: Stopwatch, part: () => T): T {
  const before = process.cpuUsage();
  const result = part();
  const used = process.cpuUsage(before);
  watch.cpuS += (used.user + used.system) / 1e6;
  return result;
}

/** One line of the report. */
export interface Row {
  readonly name: string;
  readonly ours: string;
  readonly theirs: string;
  /** Theirs over ours; null when the two sides' events did not agree, or when it could not be measured. */
  readonly ratio: number | null;
  readonly goal: number;
  readonly note: string;
}

/** Seconds for the report. */
export function seconds(s: number): string {
  return `${s.toFixed(s < 10 ? 2 : 1)} s`;
}
