/**
 * The grid of the automatic scheme: spacing from the wanted accuracy and from how sharply the cycle acts.
 *
 * Lengths are counted in diffusion time^(1/2), σ = dx/√α, in which all layers are alike. With ε = accuracy / (2 × range of the
 * temperatures), a scheme of fourth order in space needs spacings that grow by b = 1.4 ε^(1/4) per distance from where the
 * profile is sharp (second order: 2 ε^(1/2)):
 *
 *   spacing(σ) = min over the sharp places (first spacing + b × distance),  at most b × the whole part
 *
 * and 0.6 of that at layer edges and insulated faces, where the storage weights are one-sided and less exact. Nodes are placed
 * at equal fractions of the integral of 1/spacing. The constants were fitted so that the error stays below the accuracy.
 */
import type { LaidCycle } from '../model';
import type { Sharpness } from './sharpness';
import type { Shape } from './shape';
import type { TemperatureRange } from './temperatureRange';
import type { PlainRows, WallGrid } from './wallGrid';
import { startAt, type WallLayer } from './wallLayers';

/** Growth b never exceeds this: neighbours then differ by less than 1.61, and the storage weights stay positive. */
const LARGEST_GROWTH = 0.25;
const EDGE_PART = 0.6;
const FEWEST_ELEMENTS = 3;
/** The first spacing at a sharp place need not resolve what is over after this part of the cycle, or of its shortest stage. */
const SHORTEST_OF_CYCLE = 1e-4;
const SHORTEST_OF_STAGE = 1e-2;
/** No spacing is below this part of the whole; it keeps absurd plans from asking for endless grids. */
const SMALLEST_SPACING = 1e-9;
/** An element this many times longer than a front at its place gets plain storage, in so many rows. */
const UNRESOLVED = 4;
const PLAIN_ROWS = 5;

/** What the grid of a wall follows from. */
export interface GridDemand {
  readonly shape: Shape;
  readonly layers: readonly WallLayer[];
  readonly cycle: LaidCycle;
  /** K */
  readonly accuracy: number;
  readonly range: TemperatureRange;
  /** How sharply the cycle acts on either face; null: insulated throughout. */
  readonly sharpness: { readonly start: Sharpness | null; readonly end: Sharpness | null };
}

/** A place where the profile is sharp: its position and first spacing, √s. */
interface SharpPlace {
  at: number;
  first: number;
}

/** Lengths of the elements of every layer in the graded grid, m. */
export function gradedLengths(demand: GridDemand): Float64Array[] {
  const { layers, accuracy, range, sharpness } = demand;
  const growth = spacingGrowth(accuracy, range, 4);
  const edges = layerEdges(layers);
  const places = sharpPlaces(demand, edges, growth);
  const whole = edges[layers.length];
  return layers.map((layer, index) => {
    const [left, right] = [edges[index], edges[index + 1]];
    const leftIsEdge = index > 0 || sharpness.start === null;
    const rightIsEdge = index < layers.length - 1 || sharpness.end === null;
    const byPlaces = (sigma: number): number =>
      places.reduce((least, { at, first }) => Math.min(least, first + growth * Math.abs(sigma - at)), growth * whole);
    const atLeft = leftIsEdge ? EDGE_PART * byPlaces(left) : Infinity;
    const atRight = rightIsEdge ? EDGE_PART * byPlaces(right) : Infinity;
    const backFromEdge = growth / 2 + 0.25;
    const spacing = (sigma: number): number => {
      const byEdges = Math.min(atLeft + backFromEdge * (sigma - left), atRight + backFromEdge * (right - sigma));
      return Math.max(Math.min(byPlaces(sigma), byEdges), SMALLEST_SPACING * whole);
    };
    return placeElements(layer.thickness, left, right, spacing);
  });
}

/** Elements per layer for equal spacing at second order, where no sharp place is resolved: for the schemes of the textbooks. */
export function equalCounts({ layers, accuracy, range }: GridDemand): number[] {
  const growth = spacingGrowth(accuracy, range, 2);
  const edges = layerEdges(layers);
  const whole = edges[layers.length];
  const most = 200;
  return layers.map((_, index) => {
    const wanted = (edges[index + 1] - edges[index]) / (growth * whole);
    return Math.min(most, Math.max(FEWEST_ELEMENTS, Math.ceil(wanted)));
  });
}

/**
 * Where storage of fourth order would do harm: it answers a front that is finer than an element with a swing of a tenth of it to
 * the other side, at the next node and for as long as the front stays that fine. Plain rows do not. Fronts start at jumps and
 * widen with the distance from them, so they are too fine at edges of layers if anywhere; a few rows there keep the order in space.
 */
export function plainRowsOf(demand: GridDemand, lengths: readonly Float64Array[]): PlainRows[] {
  const { layers, accuracy, range } = demand;
  const growth = spacingGrowth(accuracy, range, 4);
  const edges = layerEdges(layers);
  const jumps = jumpPlaces(demand, edges);
  const rowsAt = (edge: number, length: number, layer: WallLayer): number => {
    const front = jumps.reduce((least, { at, first }) => Math.min(least, first + growth * Math.abs(edge - at)), Infinity);
    return length / Math.sqrt(diffusivity(layer)) > UNRESOLVED * front ? PLAIN_ROWS : 0;
  };
  return layers.map((layer, i) => ({
    start: rowsAt(edges[i], lengths[i][0], layer),
    end: rowsAt(edges[i + 1], lengths[i][lengths[i].length - 1], layer),
  }));
}

function spacingGrowth(accuracy: number, range: TemperatureRange, order: 2 | 4): number {
  const epsilon = (0.5 * accuracy) / Math.max(range.highest - range.lowest, accuracy);
  return Math.min(LARGEST_GROWTH, order === 4 ? 1.4 * Math.sqrt(Math.sqrt(epsilon)) : 2 * Math.sqrt(epsilon));
}

const diffusivity = ({ curves, initial }: WallLayer): number => curves.conductivity(initial) / curves.heatCapacity(initial);

/** Layer edges in σ: 0, the interfaces, and the whole part. */
function layerEdges(layers: readonly WallLayer[]): number[] {
  const edges = [0];
  for (const layer of layers) edges.push(edges[edges.length - 1] + layer.thickness / Math.sqrt(diffusivity(layer)));
  return edges;
}

/** Jumps, with the first spacings that resolve them: of the exposures, and of layers that start at different temperatures. */
function jumpPlaces({ layers, accuracy, sharpness }: GridDemand, edges: readonly number[]): SharpPlace[] {
  const { start, end } = sharpness;
  const last = layers.length - 1;
  const places: SharpPlace[] = [];
  if (start !== null) places.push({ at: 0, first: jumpSpacing(layers[0], start, accuracy) });
  if (end !== null) places.push({ at: edges[last + 1], first: jumpSpacing(layers[last], end, accuracy) });
  for (let i = 1; i <= last; i++) {
    const unequal = startAt(layers[i], 0) - startAt(layers[i - 1], layers[i - 1].thickness);
    if (Math.abs(unequal) > accuracy) places.push({ at: edges[i], first: 0 });
  }
  return places;
}

/** All that makes a profile sharp, with first spacings that resolve it from the shortest time of interest on. */
function sharpPlaces(demand: GridDemand, edges: readonly number[], growth: number): SharpPlace[] {
  const { layers, cycle, accuracy, sharpness } = demand;
  const { start, end } = sharpness;
  const last = layers.length - 1;
  const places = jumpPlaces(demand, edges);
  if (start !== null) places.push({ at: 0, first: rampSpacing(layers[0], start, accuracy) });
  if (end !== null) places.push({ at: edges[last + 1], first: rampSpacing(layers[last], end, accuracy) });
  layers.forEach((layer, i) => places.push(...kinksOf(layer, edges[i], accuracy)));
  const shortestStage = Math.min(...cycle.stages.map((stage) => stage.end - stage.start));
  const smallest = 0.5 * growth * Math.sqrt(Math.min(SHORTEST_OF_CYCLE * cycle.end, SHORTEST_OF_STAGE * shortestStage));
  return places.map(({ at, first }) => ({ at, first: Math.max(first, smallest) }));
}

/** Kinks of the profile that a layer starts with: each acts like a jump of the flux by half the change of slope, on either side. */
function kinksOf(layer: WallLayer, edge: number, accuracy: number): SharpPlace[] {
  const { profile } = layer;
  if (profile === null || !layer.kinked) return [];
  const slope = (i: number): number => (profile[i + 1][1] - profile[i][1]) / (profile[i + 1][0] - profile[i][0]);
  const metre = 1 / Math.sqrt(diffusivity(layer));
  return profile.slice(1, -1).map(([depth], i) => ({
    at: edge + depth * metre,
    first: (2 * FIRST_PART * accuracy * metre) / Math.abs(slope(i + 1) - slope(i)),
  }));
}

/** Part of the accuracy that the first moments after a jump, or at the start of a ramp, may cost. */
const FIRST_PART = 0.75;

/** First spacing at a face that resolves its jumps, √s; 0 where the temperature itself jumps, Infinity where nothing does. */
function jumpSpacing(layer: WallLayer, { temperatureJump, fluxJump }: Sharpness, accuracy: number): number {
  if (temperatureJump) return 0;
  if (fluxJump === 0) return Infinity;
  return (FIRST_PART * accuracy * layer.curves.conductivity(layer.initial)) / fluxJump / Math.sqrt(diffusivity(layer));
}

/** First spacing at a face that resolves its ramps, √s. */
function rampSpacing(layer: WallLayer, { fluxRate, temperatureRate }: Sharpness, accuracy: number): number {
  const alpha = diffusivity(layer);
  const part = FIRST_PART * accuracy * alpha;
  let first = Infinity;
  // Single precision: engines differ in the last digits of a cube root, and a plan has the same digits on all of them.
  if (fluxRate > 0) first = Math.min(first, Math.fround(Math.cbrt((part * layer.curves.conductivity(layer.initial)) / fluxRate)));
  if (temperatureRate > 0) first = Math.min(first, Math.sqrt(part / temperatureRate));
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

/** The grid of the automatic scheme: graded, or of the lengths given; plain where it must be. */
export function automaticGrid(demand: GridDemand, lengths: readonly Float64Array[] = gradedLengths(demand)): WallGrid {
  const thickness = demand.layers.map((layer) => layer.thickness);
  return { shape: demand.shape, kind: 'nodes', thickness, elements: lengths, plainRows: plainRowsOf(demand, lengths) };
}
