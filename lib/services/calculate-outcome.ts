/** A calculation's answer, or the one value that it can't go on with: plain data, so that it may cross processes. */
export type Outcome<T> =
  | { readonly ok: true; readonly body: T }
  | { readonly ok: false; readonly path: string; readonly reason: string };
