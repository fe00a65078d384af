"use client";

import { Button } from "./_components/button";

interface ErrorPageProps {
  readonly error: Error & { readonly digest?: string };
  readonly reset: () => void;
}

/** A page that failed: says so, with the reference of the log, and offers to try again. */
export default function ErrorPage({ error, reset }: ErrorPageProps) {
  return (
    <div role="alert">
      <h1 className="mb-2 text-2xl font-bold">This page failed</h1>
      <p className="max-w-[60ch] text-quiet">
        Nothing was changed by it. If it happens again, give your administrator this reference:{" "}
        <span className="figures text-ink">{error.digest ?? "none"}</span>
      </p>
      <Button className="mt-4" onClick={reset}>
        Try again
      </Button>
    </div>
  );
}
