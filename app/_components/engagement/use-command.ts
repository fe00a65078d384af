"use client";

import { useState } from "react";
import { FetchError, sendJson } from "@/app/_client/fetch-json";
import type { EngagementBody } from "@/lib/contracts/engagements";

type Details = FetchError["details"];

/**
 * Sends one command about an engagement. A refusal is kept with all its reasons, so that a form can show
 * them and nothing typed is lost.
 */
export function useCommand(onDone: (body: EngagementBody) => void) {
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<unknown>(null);
  const send = async (path: string, method: "POST" | "PATCH", body: unknown): Promise<void> => {
    setBusy(true);
    setError(null);
    try {
      onDone(await sendJson<EngagementBody>(path, method, body));
    } catch (thrown) {
      setError(thrown);
    } finally {
      setBusy(false);
    }
  };
  const details: Details = error instanceof FetchError ? error.details : [];
  return { send, busy, error, details, refuse: setError };
}

/**
 * The same refusal without the reasons that stand beside their fields already, so that nothing is said
 * twice. `isField` tells from a reason's path whether a field shows it.
 */
export function apartFrom(error: unknown, isField: (path: string) => boolean): unknown {
  if (!(error instanceof FetchError)) return error;
  const rest = error.details.filter((d) => !isField(d.path));
  if (rest.length === error.details.length) return error;
  const message = rest.length === 0 ? "See the fields that are marked." : error.message;
  return new FetchError(error.status, error.code, message, rest);
}
