"use client";

import Link from "next/link";
import { useEffect, useState } from "react";
import { type Announcement, onAnnouncement } from "@/app/_client/announce";

const NEWS_STAYS_MS = 12_000;

/** Where announcements appear; it stands once, in the layout. Send them with announce(). */
export function ToastRegion() {
  const [shown, setShown] = useState<readonly Announcement[]>([]);
  const drop = (id: number) => setShown((all) => all.filter((a) => a.id !== id));

  useEffect(
    () =>
      onAnnouncement((next) => {
        setShown((all) => [...all.slice(-3), next]);
        if (next.kind === "news") {
          setTimeout(() => setShown((all) => all.filter((a) => a.id !== next.id)), NEWS_STAYS_MS);
        }
      }),
    [],
  );

  return (
    <div className="fixed inset-x-4 bottom-4 z-50 flex flex-col items-start gap-2 sm:right-auto sm:left-7 sm:max-w-md">
      <div aria-live="polite" className="contents">
        {shown.filter((a) => a.kind === "news").map((a) => toast(a, drop))}
      </div>
      <div aria-live="assertive" className="contents">
        {shown.filter((a) => a.kind === "problem").map((a) => toast(a, drop))}
      </div>
    </div>
  );
}

function toast(a: Announcement, drop: (id: number) => void) {
  return (
    <div
      key={a.id}
      className={`flex items-start gap-4 rounded border bg-sheet px-4 py-2.5 ${a.kind === "problem" ? "border-l-4 border-dwell" : "border-ink"}`}
    >
      <p>
        {a.message}{" "}
        {a.link ? (
          <Link href={a.link.href} className="link whitespace-nowrap" onClick={() => drop(a.id)}>
            {a.link.label}
          </Link>
        ) : null}
      </p>
      <button type="button" className="act shrink-0 text-sm" onClick={() => drop(a.id)}>
        Close
      </button>
    </div>
  );
}
