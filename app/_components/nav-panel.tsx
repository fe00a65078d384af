"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import { type ReactNode, useEffect, useState } from "react";

interface NavPanelProps {
  readonly items: readonly { readonly href: string; readonly label: string }[];
  /** Theme switch and sign-out, for narrow screens. */
  readonly children: ReactNode;
}

/** The navigation: in a row where there is room, behind a Menu button with the tools below 1024 px. */
export function NavPanel({ items, children }: NavPanelProps) {
  const path = usePathname();
  const [open, setOpen] = useState(false);
  // biome-ignore lint/correctness/useExhaustiveDependencies: arriving at another page closes the menu
  useEffect(() => setOpen(false), [path]);

  return (
    <div className="px-4 pb-2 sm:px-7 lg:pb-0">
      {items.length > 0 ? (
        <button
          type="button"
          aria-expanded={open}
          aria-controls="nav-panel"
          onClick={() => setOpen(!open)}
          className="mt-1 min-h-9 w-full rounded border border-quiet px-3 text-left font-semibold lg:hidden"
        >
          {open ? "Close menu" : `Menu: ${items.find((i) => isHere(path, i.href))?.label ?? "choose a page"}`}
        </button>
      ) : null}
      <div
        id="nav-panel"
        className={`${open || items.length === 0 ? "flex" : "hidden"} flex-col gap-4 py-3 lg:flex lg:py-0`}
      >
        {items.length > 0 ? (
          <nav aria-label="Pages">
            <ul className="grid grid-cols-2 gap-x-6 sm:grid-cols-3 lg:flex lg:flex-wrap lg:gap-x-5">
              {items.map((item) => (
                <li key={item.href}>
                  <Link
                    prefetch={false}
                    href={item.href}
                    aria-current={isHere(path, item.href) ? "page" : undefined}
                    className="block border-b-2 border-transparent py-2 text-quiet hover:text-ink aria-[current=page]:border-dwell aria-[current=page]:font-semibold aria-[current=page]:text-ink"
                  >
                    {item.label}
                  </Link>
                </li>
              ))}
            </ul>
          </nav>
        ) : null}
        <div className="flex flex-wrap items-center gap-x-6 gap-y-3 lg:hidden">{children}</div>
      </div>
    </div>
  );
}

function isHere(path: string, href: string): boolean {
  return path === href || path.startsWith(`${href}/`);
}
