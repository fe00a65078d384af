"use client";

import { useState } from "react";
import { Button, ButtonLink } from "@/app/_components/button";
import { Dialog } from "@/app/_components/dialog";
import { MoveDialog } from "@/app/_components/engagement/move-dialog";
import { Facts } from "@/app/_components/facts";
import { heightText } from "@/app/_components/pass-list/change-cell";
import { StateMark } from "@/app/_components/state-mark";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { mayDrag } from "./entries";

interface EngagementDialogProps {
  readonly engagement: EngagementBody | null;
  readonly personId: string;
  readonly onClose: () => void;
  readonly onDone: (body: EngagementBody, words: string) => void;
}

/** An engagement that was picked in the calendar: what it is, and the way to move it without dragging. */
export function EngagementDialog({ engagement, personId, onClose, onDone }: EngagementDialogProps) {
  const [moving, setMoving] = useState<EngagementBody | null>(null);
  return (
    <>
      <Dialog
        open={engagement !== null && moving === null}
        onClose={onClose}
        title={engagement ? `E-${engagement.number}` : ""}
      >
        {engagement ? (
          <>
            <Summary engagement={engagement} />
            <div className="mt-5 flex flex-wrap gap-3">
              <ButtonLink look="solid" href={`/engagements/${engagement.id}`}>
                Open E-{engagement.number}
              </ButtonLink>
              {mayDrag(engagement, personId) ? (
                <Button onClick={() => setMoving(engagement)}>Move</Button>
              ) : null}
            </div>
          </>
        ) : null}
      </Dialog>
      {moving ? (
        <MoveDialog
          open
          engagement={moving}
          onClose={() => {
            setMoving(null);
            onClose();
          }}
          onDone={(body, words) => {
            setMoving(null);
            onDone(body, words);
          }}
        />
      ) : null}
    </>
  );
}

function Summary({ engagement: e }: { readonly engagement: EngagementBody }) {
  return (
    <Facts
      facts={[
        { label: "State", value: <StateMark state={e.state} /> },
        { label: "Fragment", value: e.fragmentName },
        { label: "Station", value: e.stationName },
        { label: "From", value: <UtcTime at={e.from} />, figure: true },
        { label: "To", value: <UtcTime at={e.to} />, figure: true },
        {
          label: "Length",
          value: durationText((Date.parse(e.to) - Date.parse(e.from)) / 1000),
          figure: true,
        },
        {
          label: "Orbit",
          note: "change of the semi-major axis, median, predicted",
          value: heightText(-e.semiMajorAxisDropM),
          figure: true,
        },
        { label: "Booked by", value: e.planner },
      ]}
    />
  );
}
