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
  const tools = (
    <>
      <ThemeSwitch initial={theme} />
      {person ? <Identity person={person} /> : null}
    </>
  );
  return (
    <header className="border-b border-line">
      <div className="flex flex-wrap items-center gap-x-7 gap-y-1 px-4 pt-3 sm:px-7">
        <Link prefetch={false} href="/" className="text-[1.3125rem] font-[760] tracking-tight">
          Dwellbook
        </Link>
        <div className="ml-auto flex items-center gap-7">
          {/* Where there is room the tools stand here, else at the end of the menu. */}
          <div className="flex items-center gap-7 max-lg:hidden">{tools}</div>
          <Clock nowMs={nowMs} />
        </div>
      </div>
      <NavPanel items={items}>{tools}</NavPanel>
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
