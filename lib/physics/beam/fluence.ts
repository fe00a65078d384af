import { spotAreaM2 } from "./spot";

/**
 * Mean of the on-axis fluence over a pointing jitter, as a factor from 0 to 1: 1 / (1 + 4 s²/w²), with
 * the one-axis rms s = jitter × range and w half the spot's diameter (algebra of a Gaussian spot and
 * Gaussian jitter). A pulse is not widened by jitter: it lands beside the fragment. Hence the spot stays
 * the vacuum spot and the mean fluence falls.
 */
export function jitterFactor(jitterUrad: number, rangeKm: number, diameterM: number): number {
  const offsetM = jitterUrad * 1e-6 * rangeKm * 1000;
  const radiusM = diameterM / 2;
  return 1 / (1 + (4 * offsetM * offsetM) / (radiusM * radiusM));
}

/** What reaches the fragment: each factor from 0 to 1 except the energy. */
export interface Delivery {
  readonly pulseEnergyJ: number;
  readonly transmission: number;
  /** Peak loss by wavefront error, given by the laser setting. */
  readonly strehl: number;
  readonly jitter: number;
}

/**
 * Mean fluence in J/m² on a fragment in the middle of the spot: E·T·S·J / (π d²/4). The spot counts as
 * uniform, as in the published station studies (Phipps et al. 2012, from memory); a Gaussian's peak is
 * twice that, which the published factor of two on the coupling has to cover.
 */
export function fluenceJPerM2(delivery: Delivery, diameterM: number): number {
  const { pulseEnergyJ, transmission, strehl, jitter } = delivery;
  return (pulseEnergyJ * transmission * strehl * jitter) / spotAreaM2(diameterM);
}

/** Mean irradiance in W/m² while a pulse of the given width lasts. */
export function pulseIrradianceWPerM2(fluence: number, pulseWidthNs: number): number {
  return fluence / (pulseWidthNs * 1e-9);
}
