/** The report of POST /api/element-sets. */
export interface ImportReportBody {
  readonly accepted: number;
  readonly rejected: readonly { readonly line: number; readonly column: number; readonly message: string }[];
  /** Sets that are already stored, by line. */
  readonly duplicates: readonly {
    readonly line: number;
    readonly catalogNumber: number;
    readonly message: string;
  }[];
  /** Sets that are stored but older than the newest of their object. */
  readonly older: readonly {
    readonly line: number;
    readonly catalogNumber: number;
    readonly message: string;
  }[];
  /** Objects that were new to the book. */
  readonly created: readonly { readonly catalogNumber: number; readonly name: string }[];
  readonly preview: boolean;
  readonly importId: string | null;
  /** The sweep that follows, so that the screen can show its progress. */
  readonly sweepId: string | null;
}
