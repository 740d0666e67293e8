/** Profiles through the part at a time, from the stored frames: straight in time between two frames. */
import type { Frames } from '../../solver/model';
import { clamp } from './scale';
import { indexAt } from './history';

/** Lowest and highest temperature so far, for every frame and point (row by row, as in the frames). */
export interface Envelope {
  readonly low: Float32Array;
  readonly high: Float32Array;
}

interface Between {
  frame: number;
  next: number;
  fraction: number;
}

/** The frames on both sides of a time; times outside the run take its first or last frame. */
function between(frames: Frames, time: number): Between {
  const times = frames.time_s;
  const frame = clamp(indexAt(times, time), 0, times.length - 1);
  const next = Math.min(frame + 1, times.length - 1);
  const span = times[next] - times[frame];
  return { frame, next, fraction: span > 0 ? clamp((time - times[frame]) / span, 0, 1) : 0 };
}

/** Temperatures at the frames' points at a time, °C, written into `out` (made when absent). */
export function profileAt(frames: Frames, time: number, out?: Float64Array): Float64Array {
  const points = frames.position_m.length;
  const profile = out ?? new Float64Array(points);
  if (frames.time_s.length === 0) return profile.fill(NaN);
  const { frame, next, fraction } = between(frames, time);
  const before = frame * points;
  const after = next * points;
  const temperature = frames.temperature_C;
  for (let i = 0; i < points; i++) {
    profile[i] = temperature[before + i] + fraction * (temperature[after + i] - temperature[before + i]);
  }
  return profile;
}

/** Heat flux into the part at the start and the end face at a time, W/m². */
export function faceFluxAt(frames: Frames, time: number): [number, number] {
  if (frames.time_s.length === 0) return [NaN, NaN];
  const { frame, next, fraction } = between(frames, time);
  const flux = frames.faceFlux_W_m2;
  const at = (face: number): number => flux[frame * 2 + face] + fraction * (flux[next * 2 + face] - flux[frame * 2 + face]);
  return [at(0), at(1)];
}

/** The lowest and highest so far, frame by frame: worked out once a result, looked up while playing. */
export function runningEnvelope(frames: Frames): Envelope {
  const points = frames.position_m.length;
  const low = frames.temperature_C.slice();
  const high = frames.temperature_C.slice();
  for (let i = points; i < low.length; i++) {
    if (low[i - points] < low[i]) low[i] = low[i - points];
    if (high[i - points] > high[i]) high[i] = high[i - points];
  }
  return { low, high };
}

/** The envelope from the start up to a time, the profile of that very time included; two arrays, one value a point. */
export function envelopeAt(
  frames: Frames,
  envelope: Envelope,
  time: number,
  profile: ArrayLike<number>,
): { low: Float64Array; high: Float64Array } {
  const points = frames.position_m.length;
  const low = new Float64Array(points);
  const high = new Float64Array(points);
  const row = between(frames, time).frame * points;
  for (let i = 0; i < points; i++) {
    low[i] = Math.min(envelope.low[row + i], profile[i]);
    high[i] = Math.max(envelope.high[row + i], profile[i]);
  }
  return { low, high };
}

/** A profile of heat flux: straight pieces, positive from the start face towards the end face. */
export interface FluxProfile {
  /** Layer of each point, and how far into it, 0 to 1. */
  layer: number[];
  fraction: number[];
  /** W/m². */
  flux: number[];
}

/** Pieces a layer is cut into for the slope: finer ones would show the rounding of the stored frames, not the flux. */
const SLOPE_PIECES = 40;

/**
 * Heat flux through the part from a profile: q = −k dT/dx over pieces of every layer, closed by the face fluxes.
 *
 * `conductivity` has one value a layer, W/(m·K); `faces` are the fluxes into the part at both faces, W/m².
 */
export function fluxProfile(
  frames: Frames,
  profile: ArrayLike<number>,
  conductivity: readonly number[],
  faces: readonly [number, number],
): FluxProfile {
  const out: FluxProfile = { layer: [], fraction: [], flux: [] };
  const layers = frames.layerStart.length - 1;
  const add = (layer: number, fraction: number, flux: number): void => {
    out.layer.push(layer);
    out.fraction.push(fraction);
    out.flux.push(flux);
  };
  add(0, 0, faces[0]);
  for (let layer = 0; layer < layers; layer++) {
    const first = frames.layerStart[layer];
    const last = frames.layerStart[layer + 1] - 1;
    const position = frames.position_m;
    const thickness = position[last] - position[first];
    let from = first;
    for (let i = first + 1; i <= last; i++) {
      const length = position[i] - position[from];
      if (i < last && length < thickness / SLOPE_PIECES) continue;
      const middle = (position[i] + position[from]) / 2 - position[first];
      add(layer, middle / thickness, (-conductivity[layer] * (profile[i] - profile[from])) / length);
      from = i;
    }
  }
  add(layers - 1, 1, -faces[1]);
  return out;
}
