"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import { type ReactNode, useEffect, useState } from "react";

interface NavPanelProps {
  readonly items: readonly { readonly href: string; readonly label: string }[];
  /** Theme switch and sign-out. */
  readonly children: ReactNode;
}

/** Pages and tools: in the head where there is room, behind a Menu button below 1024 px (styles/header.css). */
export function NavPanel({ items, children }: NavPanelProps) {
  const path = usePathname();
  const [open, setOpen] = useState(false);
  // biome-ignore lint/correctness/useExhaustiveDependencies: arriving at another page closes the menu
  useEffect(() => setOpen(false), [path]);

  return (
    <>
      {items.length > 0 ? (
        <button
          type="button"
          aria-expanded={open}
          aria-controls="nav-panel"
          onClick={() => setOpen(!open)}
          className="head-menu mt-1 min-h-9 rounded border border-quiet px-3 text-left font-semibold"
        >
          {open ? "Close menu" : `Menu: ${items.find((i) => isHere(path, i.href))?.label ?? "choose a page"}`}
        </button>
      ) : null}
      <div id="nav-panel" className="head-panel" data-open={open || items.length === 0}>
        {items.length > 0 ? (
          <nav aria-label="Pages" className="head-pages">
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
        <div className="head-tools">{children}</div>
      </div>
    </>
  );
}

function isHere(path: string, href: string): boolean {
  return path === href || path.startsWith(`${href}/`);
}
