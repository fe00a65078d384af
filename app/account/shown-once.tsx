"use client";

import { announce } from "@/app/_client/announce";
import { Button } from "@/app/_components/button";

interface ShownOnceProps {
  /** "The token for “nightly import”". */
  readonly title: string;
  /** Name of the field for screen readers. */
  readonly label: string;
  readonly secret: string;
  readonly onDone: () => void;
}

/** A secret at the only time it is seen: read-only text that can be copied. */
export function ShownOnce({ title, label, secret, onDone }: ShownOnceProps) {
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(secret);
      announce("Copied.");
    } catch {
      announce("The browser did not allow copying: select the text and copy it yourself.", "problem");
    }
  };
  return (
    <div role="status" className="mb-4 border-l-4 border-accent bg-paper px-3 py-3">
      <p className="font-semibold">{title}. Keep it now: it is not shown again.</p>
      <input
        readOnly
        aria-label={label}
        value={secret}
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
