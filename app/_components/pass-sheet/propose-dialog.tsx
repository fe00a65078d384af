"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { announce } from "@/app/_client/announce";
import { sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { Dialog } from "@/app/_components/dialog";
import { ErrorNote } from "@/app/_components/error-note";
import { minutesText } from "@/app/_components/start/until-text";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import type { EngagementBody } from "@/lib/contracts/engagements";
import type { JudgementBody, PassSheetBody } from "@/lib/contracts/passes";
import type { Span } from "./dwell-time";

interface ProposeDialogProps {
  readonly open: boolean;
  readonly onClose: () => void;
  readonly sheet: PassSheetBody;
  readonly dwell: Span;
  readonly judgement: JudgementBody;
}

/** Says who will be sent what, then books. A refusal stays in the dialog and nothing typed is lost. */
export function ProposeDialog({ open, onClose, sheet, dwell, judgement }: ProposeDialogProps) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<unknown>(null);
  const propose = async (): Promise<void> => {
    setBusy(true);
    setError(null);
    try {
      const booked = await sendJson<EngagementBody>("/api/engagements", "POST", {
        passId: sheet.id,
        from: new Date(dwell.fromMs).toISOString(),
        to: new Date(dwell.toMs).toISOString(),
      });
      announce(`E-${booked.number} is proposed; the notices are on their way.`);
      router.push(`/engagements/${booked.id}`);
    } catch (thrown) {
      setError(thrown);
      setBusy(false);
    }
  };
  return (
    <Dialog open={open} onClose={onClose} title="Propose this dwell">
      <p>
        {sheet.fragmentName} over {sheet.stationName}, <UtcTime at={dwell.fromMs} /> for{" "}
        {durationText((dwell.toMs - dwell.fromMs) / 1000)}.
      </p>
      <h3 className="mt-4 font-semibold">Who gets a notice by e-mail</h3>
      {judgement.concerned.length === 0 ? <p>Nobody has to be asked.</p> : null}
      <ul className="mt-1 grid gap-2">
        {judgement.concerned.map((c) => (
          <li key={c.authorityId}>
            <span className="font-semibold">{c.name}</span> ({c.kind}): {c.because.replace(/\.?$/, ".")} The
            request must reach it {minutesText(c.leadTimeMin)} before the dwell, by{" "}
            <UtcTime at={dwell.fromMs - c.leadTimeMin * 60_000} show="short" />.
          </li>
        ))}
      </ul>
      {judgement.notChecked.length > 0 ? (
        <p className="mt-4">
          Not checked, and to be attested by a person before confirmation:{" "}
          {[...new Set(judgement.notChecked.map((c) => c.cause))].join(" ")}
        </p>
      ) : null}
      <p className="mt-4 text-quiet">
        The station's slot and the fragment are held from now on. Nothing may be fired before every answer is
        in and two people have confirmed.
      </p>
      <div className="mt-4">
        <ErrorNote error={error} title="The dwell was not booked" />
      </div>
      <div className="mt-4 flex flex-wrap gap-3">
        <Button look="solid" busy={busy} onClick={() => void propose()}>
          Propose and send notices
        </Button>
        <Button onClick={onClose}>Not yet</Button>
      </div>
    </Dialog>
  );
}
