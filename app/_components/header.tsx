import Link from "next/link";
import type { PersonActor } from "@/lib/services/authenticate";
import { Clock } from "./clock";
import { navFor } from "./nav-items";
import { NavPanel } from "./nav-panel";
import { SignOutButton } from "./sign-out-button";
import type { Theme } from "./theme";
import { ThemeSwitch } from "./theme-switch";

interface HeaderProps {
  readonly person: PersonActor | null;
  readonly theme: Theme;
  readonly nowMs: number;
}

/** Mark, clock, theme and who is signed in; below, the pages this person may open. */
export function Header({ person, theme, nowMs }: HeaderProps) {
  const items = person ? navFor(person).map(({ href, label }) => ({ href, label })) : [];
  return (
    <header className="head">
      <Link prefetch={false} href="/" className="head-mark text-[1.3125rem] font-[760] tracking-tight">
        Dwellbook
      </Link>
      <div className="head-clock">
        <Clock nowMs={nowMs} />
      </div>
      <NavPanel items={items}>
        <ThemeSwitch initial={theme} />
        {person ? <Identity person={person} /> : null}
      </NavPanel>
    </header>
  );
}

function Identity({ person }: { readonly person: PersonActor }) {
  return (
    <div className="flex items-baseline gap-3">
      <Link prefetch={false} href="/account" className="link">
        {person.name}
      </Link>
      <span className="text-[0.8125rem] text-quiet">{person.role}</span>
      <SignOutButton />
    </div>
  );
}
