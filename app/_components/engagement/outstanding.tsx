import type { EngagementSheetBody } from "@/lib/contracts/engagements";
import { toAttest } from "./sheet-facts";

/** What stands between the engagement and its next state, in words. */
export function Outstanding({ sheet }: { readonly sheet: EngagementSheetBody }) {
  const waits = waitsFor(sheet);
  const attest = ["proposed", "cleared"].includes(sheet.state) ? toAttest(sheet) : [];
  return (
    <>
      <p>{STATE_WORDS[sheet.state]}</p>
      {waits.length > 0 ? (
        <ul className="mt-2 list-disc pl-5">
          {waits.map((words) => (
            <li key={words}>{words}</li>
          ))}
        </ul>
      ) : null}
      {attest.length > 0 ? (
        <p className="mt-2">
          Not checked, and to be attested with the confirmation:{" "}
          {attest.map(({ rule, causes }) => `${rule} (${causes.join(" ")})`).join("; ")}
        </p>
      ) : null}
    </>
  );
}

const STATE_WORDS: Record<EngagementSheetBody["state"], string> = {
  proposed: "Proposed: the time is held. It is cleared once everything below has come in.",
  cleared: "Cleared: every answer is in and no rule forbids it. Two different people have to confirm.",
  confirmed: "Confirmed by two people. It may be fired in its dwell, and then needs its firing record.",
  fired: "It has its firing record. Nothing is outstanding.",
  scrubbed: "Scrubbed: it will not be fired. Nothing is outstanding.",
  lapsed: "Lapsed: its time ran out before it was confirmed. Nothing is outstanding.",
};

function waitsFor(sheet: EngagementSheetBody): string[] {
  if (sheet.state === "proposed") return [...sheet.outstanding];
  if (sheet.state !== "cleared") return [];
  const first = sheet.confirmations[0];
  if (!first) return ["Two names: an operator first, then another operator or a safety officer."];
  return [`A second name beside ${first.personName}'s: another operator's or a safety officer's.`];
}
