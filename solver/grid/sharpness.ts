/**
 * How sharply a cycle acts on the two faces of a wall: what the spacing of an automatic grid follows from.
 *
 * Only bounds are wanted. The surface temperature is not known before the run, so wherever it enters, the whole range of
 * temperatures that can occur is taken.
 */
import { FACES, lineAt, type FaceId, type LaidCycle, type LaidExposure, type Line } from '../model';
import type { WallLayer } from './wallLayers';

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

/** Temperatures between which everything stays, °C; for imposed fluxes an estimate. */
export interface TemperatureRange {
  lowest: number;
  highest: number;
}

/** An exposure at one instant: the flux is imposed + coefficient × (surroundings − T); or the temperature is held. */
interface Law {
  held: number | null;
  imposed: number;
  coefficient: number;
  surroundings: number;
}

const NO_EXPOSURE: Law = { held: null, imposed: 0, coefficient: 0, surroundings: 0 };

function lawAt(exposure: LaidExposure, time: number, side: 'before' | 'after'): Law {
  switch (exposure.kind) {
    case 'insulated':
      return NO_EXPOSURE;
    case 'temperature':
      return { ...NO_EXPOSURE, held: lineAt(exposure.temperature, time, side) };
    case 'flux':
      return { ...NO_EXPOSURE, imposed: lineAt(exposure.flux, time, side) };
    case 'film':
      return {
        ...NO_EXPOSURE,
        coefficient: lineAt(exposure.coefficient, time, side),
        surroundings: lineAt(exposure.surroundings, time, side),
      };
  }
}

const linesOf = (exposure: LaidExposure): Line[] =>
  Object.values(exposure).filter((value): value is Line => typeof value === 'object');

const fluxOf = (law: Law, temperature: number): number => law.imposed + law.coefficient * (law.surroundings - temperature);

/** Sharpness of one face over the whole cycle. `initial` is the temperature at the face at the start. */
export function sharpnessOf(cycle: LaidCycle, face: FaceId, initial: number, range: TemperatureRange): Sharpness {
  const sharpness: Sharpness = { fluxJump: 0, fluxRate: 0, temperatureJump: false, temperatureRate: 0 };
  let last: Law | null = null;
  for (const stage of cycle.stages) {
    const exposure = stage.exposures[face];
    const points = linesOf(exposure).flatMap((line) => line.time);
    const times = [...new Set([stage.start, ...points, stage.end])]
      .filter((time) => time >= stage.start && time <= stage.end)
      .sort((a, b) => a - b);
    for (let i = 0; i + 1 < times.length; i++) {
      const after = lawAt(exposure, times[i], 'after');
      if (last === null) noteJump(sharpness, { ...NO_EXPOSURE, held: after.held === null ? null : initial }, after, [initial]);
      else noteJump(sharpness, last, after, [range.lowest, range.highest]);
      last = lawAt(exposure, times[i + 1], 'before');
      noteRamp(sharpness, after, last, times[i + 1] - times[i], range);
    }
  }
  return sharpness;
}

function noteJump(sharpness: Sharpness, before: Law, after: Law, temperatures: number[]): void {
  if (after.held !== null) {
    if (before.held !== after.held) sharpness.temperatureJump = true;
    return;
  }
  // A face let go of had the held temperature; one that was free can have had any.
  for (const temperature of before.held === null ? temperatures : [before.held]) {
    const jump = Math.abs(fluxOf(after, temperature) - (before.held === null ? fluxOf(before, temperature) : 0));
    sharpness.fluxJump = Math.max(sharpness.fluxJump, jump);
  }
}

function noteRamp(sharpness: Sharpness, from: Law, to: Law, duration: number, range: TemperatureRange): void {
  if (!(duration > 0)) return;
  if (from.held !== null && to.held !== null) {
    sharpness.temperatureRate = Math.max(sharpness.temperatureRate, Math.abs(to.held - from.held) / duration);
    return;
  }
  for (const temperature of [range.lowest, range.highest]) {
    const rate = Math.abs(fluxOf(to, temperature) - fluxOf(from, temperature)) / duration;
    sharpness.fluxRate = Math.max(sharpness.fluxRate, rate);
  }
}

/** The temperatures that can occur: those of the start and of everything met, widened by what imposed fluxes may add. */
export function temperatureRange(layers: readonly WallLayer[], cycle: LaidCycle): TemperatureRange {
  const met = layers.map((layer) => layer.initial);
  for (const stage of cycle.stages) {
    for (const face of FACES) {
      const exposure = stage.exposures[face];
      if (exposure.kind === 'temperature') met.push(...exposure.temperature.value);
      if (exposure.kind === 'film') met.push(...exposure.surroundings.value);
    }
  }
  let lowest = Math.min(...met);
  let highest = Math.max(...met);
  const { heating, cooling } = riseByFlux(layers, cycle);
  lowest -= cooling;
  highest += heating;
  return { lowest, highest };
}

/**
 * Estimate of what imposed fluxes add to the temperatures: stage by stage the rise of the whole part, unless the other face
 * lets the heat out first, and once the largest rise of a surface above the inside.
 */
function riseByFlux(layers: readonly WallLayer[], cycle: LaidCycle): { heating: number; cooling: number } {
  const sum = (of: (layer: WallLayer) => number): number => layers.reduce((total, layer) => total + of(layer), 0);
  const capacity = sum((layer) => layer.thickness * layer.curves.heatCapacity(layer.initial));
  const resistance = sum((layer) => layer.thickness / layer.curves.conductivity(layer.initial) + layer.contact);
  const rise = { heating: 0, cooling: 0 };
  const surface = { heating: 0, cooling: 0 };
  for (const stage of cycle.stages) {
    const duration = stage.end - stage.start;
    const perFlux = sum((layer) => surfaceRise(layer, duration));
    for (const face of FACES) {
      const exposure = stage.exposures[face];
      if (exposure.kind !== 'flux') continue;
      const other = resistanceToOutside(stage.exposures[face === 'start' ? 'end' : 'start']);
      for (const way of ['heating', 'cooling'] as const) {
        const flux = Math.max(0, ...exposure.flux.value.map((value) => (way === 'heating' ? value : -value)));
        if (flux === 0) continue;
        rise[way] += Math.min((flux * duration) / capacity, flux * (resistance + other));
        surface[way] = Math.max(surface[way], flux * perFlux);
      }
    }
  }
  return { heating: rise.heating + surface.heating, cooling: rise.cooling + surface.cooling };
}

/** Difference over a layer and its contact under a flux of 1 W/m² after some time, K: as a half space, or as in the steady state. */
function surfaceRise({ curves, initial, thickness, contact }: WallLayer, duration: number): number {
  const k = curves.conductivity(initial);
  const half = 2 * Math.sqrt(duration / (Math.PI * k * curves.heatCapacity(initial)));
  return Math.min(half, thickness / k) + contact;
}

/** Resistance between a face and what it meets, m²·K/W; Infinity where heat cannot leave. */
function resistanceToOutside(exposure: LaidExposure): number {
  if (exposure.kind === 'temperature') return 0;
  if (exposure.kind !== 'film') return Infinity;
  return 1 / Math.min(...exposure.coefficient.value);
}
