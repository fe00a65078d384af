import { UtcTime } from "@/app/_components/utc-time";
import { numberText } from "@/app/_format/figures";
import type { EngagementSheetBody } from "@/lib/contracts/engagements";

/** Who confirmed with which checklist, and who gave their word for what. */
export function WordsGiven({ sheet }: { readonly sheet: EngagementSheetBody }) {
  if (sheet.confirmations.length === 0 && sheet.attestations.length === 0) {
    return <p className="text-quiet">Nobody has confirmed yet.</p>;
  }
  return (
    <ul className="grid gap-3">
      {sheet.confirmations.map((c) => (
        <li key={`${c.personName} ${c.confirmedAt}`}>
          <p>
            <strong>{c.personName}</strong> confirmed as {c.capacity},{" "}
            <UtcTime at={c.confirmedAt} show="short" />
          </p>
          <Checklist checklist={c.checklist} />
        </li>
      ))}
      {sheet.attestations.map((a) => (
        <li key={`${a.rule} ${a.attestedAt}`}>
          <p>
            <strong>{a.personName}</strong> gave their word for “{a.rule}”,{" "}
            <UtcTime at={a.attestedAt} show="short" />
          </p>
          <p className="text-quiet">{a.statement}</p>
        </li>
      ))}
    </ul>
  );
}

function Checklist({
  checklist,
}: {
  readonly checklist: EngagementSheetBody["confirmations"][number]["checklist"];
}) {
  return (
    <p className="text-[0.875rem] text-quiet">
      Air unit called <UtcTime at={checklist.airUnitCalledAt} show="time" />, interlock tested{" "}
      <UtcTime at={checklist.interlockTestedAt} show="time" />, crewed list checked{" "}
      <UtcTime at={checklist.crewedListCheckedAt} show="time" />, clock offset{" "}
      {numberText(checklist.clockOffsetMs, Number.isInteger(checklist.clockOffsetMs) ? 0 : 1)} ms, weather:{" "}
      {checklist.weather}, spotter in place.
    </p>
  );
}
