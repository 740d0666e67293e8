/** Profiles as paths over the layers as they are drawn. */
import type { Frames, Project } from '../../solver/model';
import { linePath, type LayerRow, type Scale } from '../draw';

/** Pixel across of every point of the frames: at the same part of its layer, so that it follows a layer that is being edited. */
export function pointsAcross(frames: Frames, row: LayerRow): Float64Array {
  const { position_m: position, layerStart } = frames;
  const layers = layerStart.length - 1;
  const across = new Float64Array(position.length);
  const sameLayers = layers === row.edges.length - 1;
  for (let layer = 0; layer < layers; layer++) {
    const first = layerStart[layer];
    const last = layerStart[layer + 1] - 1;
    const thickness = position[last] - position[first];
    for (let i = first; i <= last; i++) {
      across[i] = sameLayers
        ? row.inLayer(layer, thickness > 0 ? (position[i] - position[first]) / thickness : 0)
        : row.at(position[i]);
    }
  }
  return across;
}

/** The profile, a piece a layer, so that a contact breaks it. */
export function profilePath(frames: Frames, across: Float64Array, profile: ArrayLike<number>, value: Scale): string {
  const y = Array.from(profile, (v) => value.at(v));
  let path = '';
  for (let layer = 0; layer + 1 < frames.layerStart.length; layer++) {
    path += linePath(across, y, frames.layerStart[layer], frames.layerStart[layer + 1]);
  }
  return path;
}

/** The jumps at contacts: an upright piece where the two sides of an edge differ. */
export function jumpPath(frames: Frames, across: Float64Array, profile: ArrayLike<number>, value: Scale): string {
  let path = '';
  for (let layer = 1; layer + 1 < frames.layerStart.length; layer++) {
    const after = frames.layerStart[layer];
    const [from, to] = [value.at(profile[after - 1]), value.at(profile[after])];
    if (Math.abs(from - to) > 1) path += linePath([across[after], across[after]], [from, to]);
  }
  return path;
}

/** The temperature at a place in a layer, straight between points, °C. */
export function temperatureIn(frames: Frames, profile: ArrayLike<number>, layer: number, fraction: number): number {
  const first = frames.layerStart[layer];
  const last = frames.layerStart[layer + 1] - 1;
  const position = frames.position_m;
  const depth = position[first] + fraction * (position[last] - position[first]);
  let i = first;
  while (i < last - 1 && position[i + 1] < depth) i++;
  const length = position[i + 1] - position[i];
  const share = length > 0 ? (depth - position[i]) / length : 0;
  return profile[i] + share * (profile[i + 1] - profile[i]);
}

/** Values of the profile at equal pixels between two edges: for the coloured strip. */
export function sampleAcross(
  across: ArrayLike<number>,
  values: ArrayLike<number>,
  from: number,
  to: number,
  count: number,
): Float64Array {
  const out = new Float64Array(count);
  let i = 0;
  for (let k = 0; k < count; k++) {
    const x = from + ((k + 0.5) * (to - from)) / count;
    while (i < across.length - 2 && across[i + 1] < x) i++;
    const length = across[i + 1] - across[i];
    const share = length > 0 ? (x - across[i]) / length : 0;
    out[k] = values[i] + Math.min(1, Math.max(0, share)) * (values[i + 1] - values[i]);
  }
  return out;
}

/** Conductivity of every layer, W/(m·K). */
export const conductivities = ({ part, materials }: Project): number[] =>
  part.layers.map(({ material }) => materials.find(({ id }) => id === material)?.conductivity ?? Number.NaN);
