"use client";

import { useState } from "react";
import { announce } from "@/app/_client/announce";
import { signOut } from "@/app/_client/sign-in";

/** Ends the session in this browser and loads the sign-in page afresh, so that nothing stays in memory. */
export function SignOutButton() {
  const [busy, setBusy] = useState(false);
  const leave = async () => {
    setBusy(true);
    try {
      await signOut();
      location.assign("/sign-in");
    } catch (error) {
      setBusy(false);
      announce(error instanceof Error ? error.message : "Signing out failed.", "problem");
    }
  };
  return (
    <button type="button" className="act" disabled={busy} onClick={leave}>
      Sign out
    </button>
  );
}
