/**
 * How sharply a cycle acts on the two faces of a wall: what the spacing of an automatic grid follows from.
 *
 * Only bounds are wanted. The surface temperature is not known before the run, so wherever it enters, the whole range of
 * temperatures that can occur is taken.
 */
import { instantOf, NO_EXPOSURE, temperaturesOf, timesOf, type Instant } from '../materials';
import type { FaceId, LaidCycle, LaidExposure } from '../model';
import type { TemperatureRange } from './temperatureRange';
import { startAt, type WallLayer } from './wallLayers';

/** The strongest things that happen to a face in the cycle. */
export interface Sharpness {
  /** Largest jump of the flux, W/m². */
  fluxJump: number;
  /** Largest rate of change of the flux, W/(m²·s). */
  fluxRate: number;
  /** Whether the face is held at a temperature that jumps. */
  temperatureJump: boolean;
  /** Largest rate of change of a held temperature, K/s. */
  temperatureRate: number;
}

/** A jump of a held temperature below this is rounding, K. */
const SAME_TEMPERATURE = 1e-8;

/** Sharpness of one face over the whole cycle; `layer` is the one at that face. */
export function sharpnessOf(cycle: LaidCycle, face: FaceId, layer: WallLayer, range: TemperatureRange): Sharpness {
  const sharpness: Sharpness = { fluxJump: 0, fluxRate: 0, temperatureJump: false, temperatureRate: 0 };
  const begins = startOf(layer, face);
  let last: { instant: Instant; exposure: LaidExposure } | null = null;
  for (const { start, end, exposures } of cycle.stages) {
    const exposure = exposures[face];
    const times = timesOf(exposure, start, end);
    const temperatures = temperaturesOf(exposure, range.lowest, range.highest);
    for (let i = 0; i + 1 < times.length; i++) {
      const after = instantOf(exposure, times[i], 'after');
      if (last === null) {
        const before: Instant = {
          ...NO_EXPOSURE,
          held: after.held === null ? null : begins.temperature,
          flux: () => begins.flux,
        };
        // Where boiling sets in as the face cools, the flux rises like a jump of its own.
        noteJump(sharpness, before, after, isSteep(exposure) ? [begins.temperature, ...temperatures] : [begins.temperature]);
      } else {
        const met =
          last.exposure === exposure
            ? temperatures
            : [...temperatures, ...temperaturesOf(last.exposure, range.lowest, range.highest)];
        noteJump(sharpness, last.instant, after, met);
      }
      last = { instant: instantOf(exposure, times[i + 1], 'before'), exposure };
      noteRamp(sharpness, after, last.instant, times[i + 1] - times[i], temperatures);
    }
  }
  return sharpness;
}

/** Whether the film coefficient is any function of the temperature of the face, as in a quench. */
const isSteep = (exposure: LaidExposure): boolean =>
  exposure.kind === 'film' && (exposure.coefficient.kind === 'table' || exposure.coefficient.kind === 'expression');

/** Temperature of a face at the start, °C, and the flux into the part that its profile there means, W/m². */
function startOf(layer: WallLayer, face: FaceId): { temperature: number; flux: number } {
  const { profile, thickness, curves } = layer;
  const temperature = startAt(layer, face === 'start' ? 0 : thickness);
  if (profile === null) return { temperature, flux: 0 };
  const [near, next] = face === 'start' ? [profile[0], profile[1]] : [profile[profile.length - 1], profile[profile.length - 2]];
  return { temperature, flux: (curves.conductivity(temperature) * (near[1] - next[1])) / Math.abs(near[0] - next[0]) };
}

function noteJump(sharpness: Sharpness, before: Instant, after: Instant, temperatures: readonly number[]): void {
  if (after.held !== null) {
    if (before.held === null || Math.abs(before.held - after.held) > SAME_TEMPERATURE) sharpness.temperatureJump = true;
    return;
  }
  // A face let go of had the held temperature; one that was free can have had any.
  for (const temperature of before.held === null ? temperatures : [before.held]) {
    const jump = Math.abs(after.flux(temperature) - (before.held === null ? before.flux(temperature) : 0));
    sharpness.fluxJump = Math.max(sharpness.fluxJump, jump);
  }
}

function noteRamp(sharpness: Sharpness, from: Instant, to: Instant, duration: number, temperatures: readonly number[]): void {
  if (!(duration > 0)) return;
  if (from.held !== null && to.held !== null) {
    sharpness.temperatureRate = Math.max(sharpness.temperatureRate, Math.abs(to.held - from.held) / duration);
    return;
  }
  for (const temperature of temperatures) {
    const rate = Math.abs(to.flux(temperature) - from.flux(temperature)) / duration;
    sharpness.fluxRate = Math.max(sharpness.fluxRate, rate);
  }
}
