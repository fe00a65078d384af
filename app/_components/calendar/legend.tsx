import { StateMark } from "@/app/_components/state-mark";
import { STATES } from "@/lib/engagement/states";

/** What the edges in the grid mean. */
export function Legend() {
  return (
    <div className="flex flex-wrap items-center gap-x-3 gap-y-2 text-[0.8125rem] text-quiet">
      <span>Engagements:</span>
      {STATES.map((state) => (
        <StateMark key={state} state={state} />
      ))}
      <span className="border-l-[3px] border-worth pl-2">
        the opening of a bookable pass, with the median change of its orbit
      </span>
    </div>
  );
}
