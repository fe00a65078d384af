import { Facts } from "@/app/_components/facts";
import { Section } from "@/app/_components/section";
import { settingText, settingWithUnit } from "@/app/_format/figures";
import type { LaserSettingBody } from "@/lib/contracts/stations";

/** The laser setting that plans are made with, and any others by name. */
export function LaserSection({ lasers }: { readonly lasers: readonly LaserSettingBody[] }) {
  const active = lasers.find((laser) => laser.active);
  const others = lasers.filter((laser) => laser !== active);
  return (
    <Section
      title="Laser setting"
      intro={
        active
          ? `${active.name}, version ${active.version}. Source: the setting’s own record.`
          : "None is active."
      }
    >
      {active ? (
        <Facts facts={laserFacts(active)} />
      ) : (
        <p>Without an active setting no pass can be planned.</p>
      )}
      {others.length > 0 ? (
        <p className="mt-3 text-quiet">Not in use: {others.map((laser) => laser.name).join(", ")}.</p>
      ) : null}
    </Section>
  );
}

function laserFacts(laser: LaserSettingBody) {
  return [
    { label: "Mode", value: laser.mode },
    { label: "Wavelength", value: `${settingText(laser.wavelengthNm)} nm` },
    { label: "Pulse energy", value: settingWithUnit(laser.pulseEnergyJ, "J") },
    { label: "Pulse width", value: `${settingText(laser.pulseWidthNs)} ns` },
    { label: "Repetition rate", value: settingWithUnit(laser.repetitionRateHz, "Hz") },
    {
      label: "Mean power",
      value: settingWithUnit(laser.meanPowerW, "W"),
      note: "pulse energy times repetition rate",
    },
    { label: "Aperture", value: `${settingText(laser.apertureM)} m` },
    { label: "Beam quality M²", value: settingText(laser.beamQuality) },
    { label: "Spot convention", value: laser.spotConvention, note: "which diameter is called the spot" },
    { label: "Zenith transmission", value: settingText(laser.zenithTransmission) },
    { label: "Strehl ratio", value: settingText(laser.strehl), note: "after correction of the air" },
    { label: "Jitter", value: `${settingText(laser.jitterUrad)} µrad` },
    { label: "Wall-plug efficiency", value: `${settingText(laser.wallPlugEfficiency * 100, 2)} %` },
  ].map((fact) => ({ ...fact, figure: true }));
}
