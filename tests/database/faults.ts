import { databaseFault } from "@/db/errors";

/** The PostgreSQL error that work ends in; null when it succeeds or fails otherwise. */
export async function faultOf(work: Promise<unknown>) {
  const error = await work.then(
    () => null,
    (thrown: unknown) => thrown,
  );
  return databaseFault(error);
}
