import { DwellHandles } from "@/app/_components/pass-strip/dwell-handles";
import { PassStrip } from "@/app/_components/pass-strip/pass-strip";
import { stripClosures } from "@/app/_components/pass-strip/strip-of-pass";
import { numberText } from "@/app/_format/figures";
import { utcTimeOfDay } from "@/app/_format/utc";
import type { PassSheetBody } from "@/lib/contracts/passes";
import type { Span } from "./dwell-time";

interface DwellStripProps {
  readonly sheet: PassSheetBody;
  readonly dwell: Span | null;
  /** Given where the dwell may be edited: then it has handles. */
  readonly onChange: ((next: Span) => void) | null;
}

/** The large strip of a pass with rise and set written at its ends and a key to its signs. */
export function DwellStrip({ sheet, dwell, onChange }: DwellStripProps) {
  const riseMs = Date.parse(sheet.riseAt);
  const setMs = Date.parse(sheet.setAt);
  const closures = stripClosures(sheet);
  return (
    <div className="mt-4">
      <PassStrip
        size="large"
        riseMs={riseMs}
        setMs={setMs}
        elevationDeg={sheet.strip.elevationDeg}
        worthPerS={sheet.strip.worthPerS}
        closures={closures}
        dwell={dwell}
        name={`${sheet.fragmentName} over ${sheet.stationName} from ${utcTimeOfDay(riseMs)} to ${utcTimeOfDay(setMs)}, up to ${numberText(sheet.maxElevationDeg)}°`}
        {...(dwell && onChange
          ? { handles: (frame) => <DwellHandles frame={frame} dwell={dwell} onChange={onChange} /> }
          : {})}
      />
      <div className="figures flex flex-wrap justify-between gap-x-4 text-[0.8125rem] text-quiet">
        <span>
          {utcTimeOfDay(riseMs)} rise {numberText(sheet.riseAzimuthDeg)}°
        </span>
        <span>
          set {numberText(sheet.setAzimuthDeg)}° {utcTimeOfDay(setMs)}
        </span>
      </div>
      <p className="mt-2 max-w-[90ch] text-[0.8125rem] text-quiet">
        Arch: elevation. Area over the line: seconds in which lasing lowers the orbit, the higher the more.
        Area under the line: seconds in which it would raise it. Hatched: closed or not checked. Dots on top:
        an answer or a fresher element set is awaited.
        {dwell ? ` Bar: the dwell${onChange ? "; drag it or its ends" : ""}.` : ""}
      </p>
    </div>
  );
}
