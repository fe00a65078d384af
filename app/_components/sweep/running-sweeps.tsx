"use client";

import { useEffect, useRef, useState } from "react";
import useSWR, { useSWRConfig } from "swr";
import { announce } from "@/app/_client/announce";
import { fetchJson, sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { ErrorNote } from "@/app/_components/error-note";
import type { SweepBody } from "@/lib/contracts/sweeps";
import { SweepBar } from "./sweep-progress";

interface RunningSweepsProps {
  /** Who may import element sets may also end a sweep. */
  readonly mayCancel: boolean;
}

/** The sweeps that run now, above the passes they are about to change; nothing when none does. */
export function RunningSweeps({ mayCancel }: RunningSweepsProps) {
  const { mutate: mutateAny } = useSWRConfig();
  const { data, error, mutate } = useSWR<{ sweeps: SweepBody[] }>("/api/sweeps", fetchJson, {
    refreshInterval: (latest) => (latest?.sweeps.some(isRunning) ? 2_000 : 30_000),
    revalidateOnFocus: false,
  });
  const running = data?.sweeps.filter(isRunning) ?? [];
  const before = useRef(0);
  useEffect(() => {
    // When the last one ends, the passes on the screen are old.
    if (before.current > 0 && running.length === 0) {
      void mutateAny((key) => typeof key === "string" && key.startsWith("/api/passes?"));
    }
    before.current = running.length;
  }, [running.length, mutateAny]);
  if (error) return <ErrorNote error={error} title="The progress of sweeps could not be read" />;
  if (running.length === 0) return null;
  const [newest, ...earlier] = running;
  const row = (sweep: SweepBody) => (
    <RunningSweep key={sweep.id} sweep={sweep} mayCancel={mayCancel} onCancelled={() => void mutate()} />
  );
  return (
    <section aria-label="Sweeps under way" className="sheet mb-5 grid gap-4 p-4">
      {newest ? row(newest) : null}
      {earlier.length > 0 ? (
        <details>
          <summary className="min-h-8 cursor-pointer">{earlier.length} earlier under way too</summary>
          <div className="mt-3 grid gap-4">{earlier.map(row)}</div>
        </details>
      ) : null}
    </section>
  );
}

function RunningSweep(props: {
  readonly sweep: SweepBody;
  readonly mayCancel: boolean;
  readonly onCancelled: () => void;
}) {
  const { sweep } = props;
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<unknown>(null);
  const cancel = async (): Promise<void> => {
    setBusy(true);
    setError(null);
    try {
      await sendJson<SweepBody>(`/api/sweeps/${sweep.id}/cancel`, "POST");
      announce("The sweep is cancelled; what it had worked out stays.");
      props.onCancelled();
    } catch (thrown) {
      setError(thrown);
      setBusy(false);
    }
  };
  return (
    <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
      <div className="min-w-0 flex-1 basis-80">
        <p className="text-[0.8125rem] text-quiet first-letter:uppercase">{sweep.reason}</p>
        <SweepBar sweep={sweep} />
        <ErrorNote error={error} title="The sweep was not cancelled" />
      </div>
      {props.mayCancel ? (
        <Button look="grave" busy={busy} onClick={() => void cancel()}>
          Cancel this sweep
        </Button>
      ) : null}
    </div>
  );
}

function isRunning(sweep: SweepBody): boolean {
  return sweep.state === "running";
}
