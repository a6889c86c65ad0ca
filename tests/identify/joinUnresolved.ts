/** A line as it leaves the gas: observed vacuum Angstrom, flux. */
export interface EmittedLine {
  readonly line: number;
  readonly at: number;
  readonly flux: number;
}

/** What a spectrograph makes of lines nearer than a width. */
export interface Blend {
  at: number;
  flux: number;
  /** Strongest first. */
  parts: { line: number; flux: number }[];
}

/** A feature further than this share of a width from the next one is measured apart. */
const APART_FWHM = 0.9;

/** Neighbours nearer than a width are measured as one, at their mean weighted by flux. */
export function joinUnresolved(emitted: readonly EmittedLine[], resolvingPower: number): Blend[] {
  const blends: Blend[] = [];
  for (const { line, at, flux } of [...emitted].sort((a, b) => a.at - b.at)) {
    const last = blends[blends.length - 1];
    if (last && at - last.at < (APART_FWHM * at) / resolvingPower) {
      last.at = (last.at * last.flux + at * flux) / (last.flux + flux);
      last.flux += flux;
      last.parts.push({ line, flux });
    } else blends.push({ at, flux, parts: [{ line, flux }] });
  }
  for (const blend of blends) blend.parts.sort((a, b) => b.flux - a.flux);
  return blends;
}
