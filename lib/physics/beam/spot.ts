/**
 * What "diameter" of the spot means. It alone changes the fluence almost fourfold, so it is a field of
 * every laser setting: "gaussian" is the 1/e² diameter, "airy" the first dark ring, a number is the
 * factor itself.
 */
export type SpotConvention = "gaussian" | "airy" | number;

/** Factor a of the spot law a·M²·λ·R/D: 4/π for a Gaussian's 1/e² diameter, 2.44 for the dark ring. */
export function spotFactor(convention: SpotConvention): number {
  if (convention === "gaussian") return 4 / Math.PI;
  return convention === "airy" ? 2.44 : convention;
}

/** What the spot law needs of a beam. */
export interface BeamOptics {
  readonly wavelengthNm: number;
  readonly apertureM: number;
  /** M²: 1 for a perfect beam. */
  readonly beamQuality: number;
  readonly spotConvention: SpotConvention;
}

/** Diameter in metres of the spot of a single pulse in vacuum at a range in km: a·M²·λ·R/D (diffraction). */
export function spotDiameterM(optics: BeamOptics, rangeKm: number): number {
  const wavelengthM = optics.wavelengthNm * 1e-9;
  const rangeM = rangeKm * 1000;
  return (spotFactor(optics.spotConvention) * optics.beamQuality * wavelengthM * rangeM) / optics.apertureM;
}

/** Area in m² of a round spot of the given diameter. */
export function spotAreaM2(diameterM: number): number {
  return (Math.PI / 4) * diameterM * diameterM;
}

/**
 * Share, 0 to 1, of the energy in the spot that a fragment of the given projected area takes, with the
 * spot taken as uniform and the fragment in its middle. A fragment larger than the spot takes all of it.
 */
export function interceptedShare(areaM2: number, diameterM: number): number {
  return Math.min(1, areaM2 / spotAreaM2(diameterM));
}
