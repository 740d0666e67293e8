/**
 * How fast a layer lets changes of temperature through, and how steep they get in it, over the temperatures that can occur.
 *
 * Lengths are counted in diffusion time^(1/2), σ = dx/√α. α is the slowest that is met: the least conductivity over the mean heat
 * capacity, latent heat left out. Where heat comes from a side that conducts better than what lies ahead of it, the front gets
 * steeper than distance and time say: by the ratio of conductivities, nearly. Fitted to slabs whose conductivity rises 1 to 10 times.
 */
import type { TemperatureRange } from './temperatureRange';
import type { WallLayer } from './wallLayers';

/** Ratios of conductivities below this change nothing that the other constants do not cover. */
const STEEP_FROM = 1.4;
const STEEPENING = 0.4;

/** α, m²/s. */
export function diffusivity({ curves, initial }: WallLayer, { lowest, highest }: TemperatureRange): number {
  if (curves.constant) return curves.conductivity(initial) / curves.heatCapacity(initial);
  return curves.slopesBetween(lowest, highest).conductivity[0] / curves.meanCapacity(lowest, highest);
}

/** The part of a spacing that is enough elsewhere which is enough in a layer, 1 or less. */
export function steepening({ curves }: WallLayer, { lowest, highest }: TemperatureRange): number {
  if (curves.constant) return 1;
  const [least, greatest] = curves.slopesBetween(lowest, highest).conductivity;
  // Single precision: engines differ in the last digits of a power, and a plan has the same digits on all of them.
  return Math.fround(Math.min(1, Math.pow((STEEP_FROM * least) / greatest, STEEPENING)));
}
