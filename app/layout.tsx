import type { Metadata, Viewport } from "next";
import { cookies } from "next/headers";
import { connection } from "next/server";
import type { ReactNode } from "react";
import { StandingCaution } from "./_components/caution";
import { Header } from "./_components/header";
import { themeOf } from "./_components/theme";
import { ToastRegion } from "./_components/toast-region";
import { currentPerson } from "./_server/require-person";
import { fontVariables } from "./fonts";
import "./globals.css";

export const metadata: Metadata = {
  title: { default: "Dwellbook", template: "%s · Dwellbook" },
  description: "The engagement book of a ground-laser debris-clearing service.",
  robots: { index: false, follow: false },
};

export const viewport: Viewport = { width: "device-width", initialScale: 1 };

/** The shell of every page. It shows who is signed in but grants nothing: each page asks for itself. */
export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  // A page made at build time would carry no nonce, and its scripts would be blocked.
  await connection();
  const theme = themeOf((await cookies()).get("dwellbook.theme")?.value);
  const person = await currentPerson();
  return (
    <html
      lang="en"
      className={fontVariables}
      data-theme={theme === "system" ? undefined : theme}
      suppressHydrationWarning
    >
      <body>
        <a
          href="#main"
          className="sr-only rounded bg-ink px-4 py-2 text-sheet focus:not-sr-only focus:absolute focus:top-2 focus:left-2 focus:z-50"
        >
          Skip to the page
        </a>
        <Header person={person} theme={theme} nowMs={Date.now()} />
        <main id="main" tabIndex={-1} className="w-full px-4 py-5 outline-none sm:px-7">
          {children}
        </main>
        <StandingCaution />
        <ToastRegion />
      </body>
    </html>
  );
}
