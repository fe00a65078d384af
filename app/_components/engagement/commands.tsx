"use client";

import { useState } from "react";
import { announce } from "@/app/_client/announce";
import { Button } from "@/app/_components/button";
import type { EngagementBody, EngagementSheetBody } from "@/lib/contracts/engagements";
import { ConfirmDialog } from "./confirm-dialog";
import { FireDialog } from "./fire-dialog";
import { MoveDialog } from "./move-dialog";
import { ScrubDialog } from "./scrub-dialog";
import { refusalsBefore } from "./sheet-facts";

type Name = EngagementSheetBody["commands"][number]["command"];

const LABELS: Record<Name, string> = {
  confirm: "Confirm",
  fire: "Record firing",
  move: "Move",
  scrub: "Scrub",
};
const ORDER: readonly Name[] = ["confirm", "fire", "move", "scrub"];

/**
 * Whether a command belongs to a state at all. What an engagement is past, or is not yet near, would be
 * refused for one reason alone, which its state tells already.
 */
function fits(name: Name, state: EngagementSheetBody["state"]): boolean {
  if (state === "confirmed") return name !== "confirm";
  return (state === "proposed" || state === "cleared") && name !== "fire";
}

interface CommandsProps {
  readonly sheet: EngagementSheetBody;
  readonly onChanged: (body: EngagementBody) => void;
}

/** What the viewer may do now; what is refused says why in words. */
export function Commands({ sheet, onChanged }: CommandsProps) {
  const [open, setOpen] = useState<Name | null>(null);
  const commands = ORDER.flatMap((name) => sheet.commands.filter((c) => c.command === name))
    .filter((c) => fits(c.command, sheet.state))
    .map((c) => ({ name: c.command, refusals: refusalsBefore(c, sheet) }));
  const close = (): void => setOpen(null);
  const done = (body: EngagementBody, words: string): void => {
    close();
    announce(words);
    onChanged(body);
  };
  if (commands.length === 0) return null;
  const refused = commands.filter((c) => c.refusals.length > 0);
  return (
    <section aria-label="What you may do" className="grid gap-3">
      <div className="flex flex-wrap gap-3">
        {commands.map(({ name, refusals }) => (
          <Button
            key={name}
            look={name === "scrub" ? "grave" : name === "move" ? "plain" : "solid"}
            disabled={refusals.length > 0}
            aria-describedby={refusals.length > 0 ? `why-not-${name}` : undefined}
            onClick={() => setOpen(name)}
          >
            {LABELS[name]}
          </Button>
        ))}
      </div>
      {refused.map(({ name, refusals }) => (
        <div key={name} id={`why-not-${name}`} className="max-w-[75ch] text-[0.875rem] text-quiet">
          <span className="font-semibold text-ink">{LABELS[name]}: not now.</span> {refusals.join(" ")}
        </div>
      ))}
      <ConfirmDialog open={open === "confirm"} onClose={close} onDone={done} sheet={sheet} />
      <FireDialog open={open === "fire"} onClose={close} onDone={done} engagement={sheet} />
      <MoveDialog open={open === "move"} onClose={close} onDone={done} engagement={sheet} />
      <ScrubDialog open={open === "scrub"} onClose={close} onDone={done} engagement={sheet} />
    </section>
  );
}
