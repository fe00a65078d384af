/**
 * A constant with its origin, so that every screen can say where a number comes from. "From memory"
 * means that no one re-read the source: it is a default to be replaced by a measurement.
 */
export interface Sourced {
  readonly value: number;
  readonly source: string;
}
