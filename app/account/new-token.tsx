"use client";

import { announce } from "@/app/_client/announce";
import { Button } from "@/app/_components/button";
import type { NewTokenBody } from "@/lib/contracts/account";

interface NewTokenProps {
  readonly made: NewTokenBody;
  readonly onDone: () => void;
}

/** The only time a token is seen: read-only text that can be copied. */
export function NewToken({ made, onDone }: NewTokenProps) {
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(made.token);
      announce("The token is copied.");
    } catch {
      announce("The browser did not allow copying: select the token and copy it yourself.", "problem");
    }
  };
  return (
    <div role="status" className="mb-4 border-l-4 border-accent bg-paper px-3 py-3">
      <p className="font-semibold">The token for “{made.label}”. Keep it now: it is not shown again.</p>
      <input
        readOnly
        aria-label="New token"
        value={made.token}
        onFocus={(event) => event.currentTarget.select()}
        className="control figures mt-2"
      />
      <div className="mt-3 flex gap-2.5">
        <Button look="solid" onClick={copy}>
          Copy
        </Button>
        <Button onClick={onDone}>I have kept it</Button>
      </div>
    </div>
  );
}
