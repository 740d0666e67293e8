/**
 * The grid of the automatic scheme: spacing from the wanted accuracy and from how sharply the cycle acts.
 *
 * Lengths are counted in diffusion time^(1/2), σ = dx/√α, in which all layers are alike. With ε = accuracy / (2 × range of the
 * temperatures), a scheme of fourth order in space needs spacings that grow by b = 1.6 ε^(1/4) per distance from where the
 * profile is sharp (second order: 2 ε^(1/2)):
 *
 *   spacing(σ) = min over the sharp places (first spacing + b × distance),  at most b × the whole part
 *
 * and 0.6 of that at layer edges and insulated faces, where the storage weights are one-sided and less exact. Nodes are placed
 * at equal fractions of the integral of 1/spacing. The constants were fitted so that the error stays below the accuracy.
 */
import { FACES, type LaidCycle } from '../model';
import { sharpnessOf, type Sharpness, type TemperatureRange } from './sharpness';
import type { WallGrid } from './wallGrid';
import type { WallLayer } from './wallLayers';

/** Growth b never exceeds this: neighbours then differ by less than 1.61, and the storage weights stay positive. */
const LARGEST_GROWTH = 0.45;
const EDGE_PART = 0.6;
const FEWEST_ELEMENTS = 3;
/** The first spacing at a sharp place need not resolve what is over after this part of the cycle, or of its shortest stage. */
const SHORTEST_OF_CYCLE = 1e-4;
const SHORTEST_OF_STAGE = 1e-2;
/** No spacing is below this part of the whole; it keeps absurd plans from asking for endless grids. */
const SMALLEST_SPACING = 1e-9;

/** A place where the profile is sharp: its position and first spacing, √s. */
interface SharpPlace {
  at: number;
  first: number;
}

/** The graded grid for an accuracy in K. */
export function automaticGrid(
  layers: readonly WallLayer[],
  cycle: LaidCycle,
  accuracy: number,
  range: TemperatureRange,
): WallGrid {
  const growth = spacingGrowth(accuracy, range, 4);
  const edges = layerEdges(layers);
  const { places, exposed } = sharpPlaces(layers, edges, cycle, accuracy, range, growth);
  const whole = edges[layers.length];
  const elements = layers.map((layer, index) => {
    const [left, right] = [edges[index], edges[index + 1]];
    const leftIsEdge = index > 0 || !exposed.start;
    const rightIsEdge = index < layers.length - 1 || !exposed.end;
    const spacing = (sigma: number): number => {
      let wanted = growth * whole;
      for (const place of places) wanted = Math.min(wanted, place.first + growth * Math.abs(sigma - place.at));
      const edge = Math.min(leftIsEdge ? sigma - left : Infinity, rightIsEdge ? right - sigma : Infinity);
      if (edge < Infinity) wanted = Math.min(wanted, EDGE_PART * wanted + (growth / 2 + 0.25) * edge);
      return Math.max(wanted, SMALLEST_SPACING * whole);
    };
    return placeElements(layer.thickness, left, right, spacing);
  });
  return { kind: 'nodes', thickness: layers.map((layer) => layer.thickness), elements };
}

/** Elements per layer for equal spacing at second order, where no sharp place is resolved: for the schemes of the textbooks. */
export function equalCounts(layers: readonly WallLayer[], accuracy: number, range: TemperatureRange): number[] {
  const growth = spacingGrowth(accuracy, range, 2);
  const edges = layerEdges(layers);
  const whole = edges[layers.length];
  const most = 200;
  return layers.map((_, index) => {
    const wanted = (edges[index + 1] - edges[index]) / (growth * whole);
    return Math.min(most, Math.max(FEWEST_ELEMENTS, Math.ceil(wanted)));
  });
}

function spacingGrowth(accuracy: number, range: TemperatureRange, order: 2 | 4): number {
  const epsilon = (0.5 * accuracy) / Math.max(range.highest - range.lowest, accuracy);
  return Math.min(LARGEST_GROWTH, order === 4 ? 1.6 * epsilon ** 0.25 : 2 * Math.sqrt(epsilon));
}

const diffusivity = ({ curves, initial }: WallLayer): number => curves.conductivity(initial) / curves.heatCapacity(initial);

/** Layer edges in σ: 0, the interfaces, and the whole part. */
function layerEdges(layers: readonly WallLayer[]): number[] {
  const edges = [0];
  for (const layer of layers) edges.push(edges[edges.length - 1] + layer.thickness / Math.sqrt(diffusivity(layer)));
  return edges;
}

function sharpPlaces(
  layers: readonly WallLayer[],
  edges: readonly number[],
  cycle: LaidCycle,
  accuracy: number,
  range: TemperatureRange,
  growth: number,
): { places: SharpPlace[]; exposed: Record<'start' | 'end', boolean> } {
  const shortestStage = Math.min(...cycle.stages.map((stage) => stage.end - stage.start));
  const smallest = 0.5 * growth * Math.sqrt(Math.min(SHORTEST_OF_CYCLE * cycle.end, SHORTEST_OF_STAGE * shortestStage));
  const places: SharpPlace[] = [];
  const exposed = { start: false, end: false };
  for (const face of FACES) {
    const layer = face === 'start' ? layers[0] : layers[layers.length - 1];
    const wanted = firstSpacing(layer, sharpnessOf(cycle, face, layer.initial, range), accuracy);
    exposed[face] = cycle.stages.some((stage) => stage.exposures[face].kind !== 'insulated');
    if (exposed[face]) places.push({ at: face === 'start' ? 0 : edges[layers.length], first: Math.max(wanted, smallest) });
  }
  // Layers that meet at different temperatures act on each other like a jump.
  for (let i = 1; i < layers.length; i++) {
    const difference = Math.abs(layers[i].initial - layers[i - 1].initial);
    if (difference > accuracy) places.push({ at: edges[i], first: smallest });
  }
  return { places, exposed };
}

/** First spacing at a face, √s: what keeps the error of the first moments after a jump, or at the start of a ramp, small. */
function firstSpacing(layer: WallLayer, sharpness: Sharpness, accuracy: number): number {
  if (sharpness.temperatureJump) return 0;
  const k = layer.curves.conductivity(layer.initial);
  const alpha = diffusivity(layer);
  const part = 0.75 * accuracy;
  let first = Infinity;
  if (sharpness.fluxJump > 0) first = Math.min(first, (part * k) / sharpness.fluxJump);
  if (sharpness.fluxRate > 0) first = Math.min(first, Math.cbrt((part * k * alpha) / sharpness.fluxRate));
  if (sharpness.temperatureRate > 0) first = Math.min(first, Math.sqrt((part * alpha) / sharpness.temperatureRate));
  return first / Math.sqrt(alpha);
}

/** Lengths (m) of the elements of a layer from `left` to `right` in σ: equal fractions of the integral of 1/spacing. */
function placeElements(thickness: number, left: number, right: number, spacing: (sigma: number) => number): Float64Array {
  const sigma = [left];
  const integral = [0];
  // Marching by a quarter of the spacing sees every grading, however sharp.
  for (let at = left; at < right;) {
    const step = Math.min(0.25 * spacing(at), right - at);
    const next = right - (at + step) < 1e-12 * (right - left) ? right : at + step;
    integral.push(integral[integral.length - 1] + (next - at) / spacing((at + next) / 2));
    sigma.push(next);
    at = next;
  }
  const total = integral[integral.length - 1];
  const count = Math.max(FEWEST_ELEMENTS, Math.ceil(total));
  const toMetres = thickness / (right - left);
  const lengths = new Float64Array(count);
  let from = left;
  let piece = 0;
  for (let i = 1; i <= count; i++) {
    const wanted = (total * i) / count;
    while (piece + 1 < integral.length - 1 && integral[piece + 1] < wanted) piece++;
    const part = (wanted - integral[piece]) / (integral[piece + 1] - integral[piece]);
    const to = i === count ? right : sigma[piece] + part * (sigma[piece + 1] - sigma[piece]);
    lengths[i - 1] = (to - from) * toMetres;
    from = to;
  }
  return lengths;
}
