import { Figure, Figures } from "@/app/_components/figure";
import { numberText } from "@/app/_format/figures";
import { utcTimeOfDay } from "@/app/_format/utc";
import type { PassSkyBody } from "@/lib/contracts/pass-surroundings";

/** Sun, Moon, darkness and the light on the fragment, in words and degrees. */
export function SkyFigures({ sky }: { readonly sky: PassSkyBody }) {
  const { sun, moon } = sky;
  return (
    <Figures label="Light">
      <Figure size="small" value={sky.darkness} label="at the station at culmination" note={SUN_NOTE} />
      <Figure
        size="small"
        value={heightText(sun.elevationDeg)}
        label={azimuthLabel("Sun", sun)}
        note={SUN_NOTE}
      />
      <Figure
        size="small"
        value={heightText(moon.elevationDeg)}
        label={`${azimuthLabel("Moon", moon)}, ${numberText(100 * moon.litShare)} % lit`}
        note="low-precision series of the Astronomical Almanac, to some 0.3°"
      />
      <Figure size="small" value={lightText(sky)} label="the Sun on the fragment" note={SHADOW_NOTE} />
    </Figures>
  );
}

const SUN_NOTE = "geometric, without refraction; twilight at 6°, 12° and 18° below the horizon";
const SHADOW_NOTE = "conical shadow of a round Earth without air; edges to some 6 s";

function heightText(elevationDeg: number): string {
  const words = elevationDeg < 0 ? "below" : "high";
  return `${numberText(Math.abs(elevationDeg), 1)}° ${words}`;
}

function azimuthLabel(body: string, at: { readonly azimuthDeg: number }): string {
  return `${body}, azimuth ${numberText(at.azimuthDeg)}°`;
}

/** "umbra, sunlit from 16:31:41Z". */
function lightText(sky: PassSkyBody): string {
  const [first, ...later] = sky.sunlight;
  if (!first) return "not known";
  const changes = later.map(({ sunlight, from }) => `${sunlight} from ${utcTimeOfDay(Date.parse(from))}`);
  return [first.sunlight, ...changes].join(", ");
}
