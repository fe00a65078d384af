import { cookies } from "next/headers";
import { PageHeader } from "@/app/_components/page-header";
import { Section } from "@/app/_components/section";
import { themeOf } from "@/app/_components/theme";
import { ThemeSwitch } from "@/app/_components/theme-switch";
import { requirePerson } from "@/app/_server/require-person";
import { RIGHTS } from "@/lib/engagement/roles";
import { listTokens } from "@/lib/services/tokens";
import { CalendarLink } from "./calendar-link";
import { PasswordForm } from "./password-form";
import { SessionsForm } from "./sessions-form";
import { TokenList } from "./token-list";

export const metadata = { title: "Account" };

export default async function AccountPage() {
  const person = await requirePerson();
  const [{ tokens }, jar] = await Promise.all([listTokens(person), cookies()]);
  return (
    <>
      <PageHeader title={person.name} aside={person.email}>
        You are signed in as {person.role}
        {person.isSafetyOfficer ? " and safety officer" : ""}. That lets you: {RIGHTS[person.role].join(", ")}
        .
      </PageHeader>
      <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,3fr)_minmax(20rem,2fr)]">
        <div className="grid min-w-0 gap-5">
          <TokenList initial={tokens} />
          <CalendarLink />
        </div>
        <div className="grid gap-5">
          <Section title="Theme" intro="Red is for eyes used to the dark: it lights no green and no blue.">
            <ThemeSwitch initial={themeOf(jar.get("dwellbook.theme")?.value)} />
          </Section>
          <PasswordForm />
          <SessionsForm />
        </div>
      </div>
    </>
  );
}
