/**
 * A kind of job: its name in the queue and what it does. A task is a thin wrapper on a service; it
 * throws to be tried again with the library's backoff, and returns when nothing is left to do.
 */
export interface Task {
  readonly name: string;
  run(payload: unknown): Promise<void>;
}
