"use client";

import { type FormEvent, useState } from "react";
import { signIn } from "@/app/_client/sign-in";
import { Button } from "@/app/_components/button";
import { Field } from "@/app/_components/field";

/** The same words whatever was wrong: nobody learns here which accounts exist. */
const REFUSED = "That address and password don’t open the book. Check both and try again.";
const THROTTLED = "Too many attempts. Wait a quarter of an hour, then try again.";
const FAILED = "The sign-in could not be checked just now. Try again in a moment.";

/** Signs in and loads the asked page afresh, so that everything on it is drawn for this person. */
export function SignInForm({ returnTo }: { readonly returnTo: string }) {
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);

  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    setBusy(true);
    setProblem(null);
    try {
      const outcome = await signIn(String(form.get("email")), String(form.get("password")));
      if (outcome.ok) {
        location.assign(returnTo);
        return;
      }
      setProblem(
        outcome.error === "throttled" ? THROTTLED : outcome.error === "CredentialsSignin" ? REFUSED : FAILED,
      );
    } catch (error) {
      setProblem(error instanceof Error ? error.message : FAILED);
    }
    setBusy(false);
  };

  // post: sent before the script runs, a password must not land in an address.
  return (
    <form method="post" onSubmit={submit} className="flex flex-col gap-4">
      <Field label="E-mail address">
        {(control) => <input {...control} name="email" type="email" autoComplete="username" required />}
      </Field>
      <Field label="Password">
        {(control) => (
          <input {...control} name="password" type="password" autoComplete="current-password" required />
        )}
      </Field>
      <p role="alert" className={problem ? "border-l-4 border-dwell pl-3" : ""}>
        {problem}
      </p>
      <Button type="submit" look="solid" busy={busy}>
        Sign in
      </Button>
      <p className="text-[0.8125rem] text-quiet">A sign-in lasts twelve hours, or until you sign out.</p>
    </form>
  );
}
