/**
 * The temperatures that can occur: those of the start and of everything met, widened by what fluxes, sources and reactions may
 * add. An estimate: the accuracy of a grid and the worst of a law over temperature follow from it, nothing else.
 */
import { instantOf, timesOf } from '../materials';
import {
  evaluatorOf,
  FACES,
  SOURCE_VARIABLES,
  type Contact,
  type LaidCycle,
  type LaidExposure,
  type LaidSource,
  type LaidStage,
} from '../model';
import type { WallLayer } from './wallLayers';

/** Temperatures between which everything stays, °C. */
export interface TemperatureRange {
  lowest: number;
  highest: number;
}

export function temperatureRange(layers: readonly WallLayer[], cycle: LaidCycle): TemperatureRange {
  const met = layers.flatMap(({ initial, profile }) => profile?.map(([, temperature]) => temperature) ?? [initial]);
  for (const { start, end, exposures } of cycle.stages)
    for (const face of FACES) met.push(...outsideOf(exposures[face], start, end));
  const range = { lowest: Math.min(...met), highest: Math.max(...met) };
  const rises = [riseByFlux(layers, cycle), riseBySources(layers, cycle, range), riseByReactions(layers)];
  for (const { heating, cooling } of rises) {
    range.lowest -= cooling;
    range.highest += heating;
  }
  return range;
}

/** Temperatures that a face meets between two times. */
const outsideOf = (exposure: LaidExposure, start: number, end: number): number[] =>
  instantsOf(exposure, start, end).flatMap(({ outside }) => outside);

const instantsOf = (exposure: LaidExposure, start: number, end: number) =>
  timesOf(exposure, start, end).flatMap((time) => [
    ...(time > start ? [instantOf(exposure, time, 'before')] : []),
    ...(time < end ? [instantOf(exposure, time, 'after')] : []),
  ]);

interface Rise {
  heating: number;
  cooling: number;
}

const sumOver = (layers: readonly WallLayer[], of: (layer: WallLayer) => number): number =>
  layers.reduce((total, layer) => total + of(layer), 0);

/** Resistance of all layers and contacts, m²·K/W; a gap counts as still air at room temperature (0.026 W/(m·K)). */
const resistanceOf = (layers: readonly WallLayer[]): number =>
  sumOver(
    layers,
    ({ thickness, curves, initial, contact }) => thickness / curves.conductivity(initial) + contactResistance(contact),
  );

const contactResistance = (contact: Contact): number => (typeof contact === 'number' ? contact : contact.gap / 0.026);

/**
 * Estimate of what imposed fluxes add to the temperatures: stage by stage the rise of the whole part, unless the other face
 * lets the heat out first, and once the largest rise of a surface above the inside.
 */
function riseByFlux(layers: readonly WallLayer[], cycle: LaidCycle): Rise {
  const capacity = sumOver(layers, (layer) => layer.thickness * layer.curves.heatCapacity(layer.initial));
  const resistance = resistanceOf(layers);
  const rise = { heating: 0, cooling: 0 };
  const surface = { heating: 0, cooling: 0 };
  for (const stage of cycle.stages) {
    const duration = stage.end - stage.start;
    for (const face of FACES) {
      const exposure = stage.exposures[face];
      if (exposure.kind !== 'flux') continue;
      const other = resistanceToOutside(stage, face === 'start' ? 'end' : 'start');
      const { curves, initial } = face === 'start' ? layers[0] : layers[layers.length - 1];
      const effusivity = Math.sqrt(curves.conductivity(initial) * curves.heatCapacity(initial));
      const fluxes = instantsOf(exposure, stage.start, stage.end).map((instant) => instant.flux(initial));
      for (const way of ['heating', 'cooling'] as const) {
        const flux = Math.max(0, ...fluxes.map((value) => (way === 'heating' ? value : -value)));
        if (flux === 0) continue;
        rise[way] += Math.min((flux * duration) / capacity, flux * (resistance + other));
        // A half space under constant flux; or the whole part in its steady state.
        const half = (2 * flux * Math.sqrt(duration / Math.PI)) / effusivity;
        surface[way] = Math.max(surface[way], Math.min(half, flux * resistance));
      }
    }
  }
  return { heating: rise.heating + surface.heating, cooling: rise.cooling + surface.cooling };
}

/** Resistance between a face and what it meets where that is smallest in a stage, m²·K/W; Infinity where heat cannot leave. */
function resistanceToOutside({ start, end, exposures }: LaidStage, face: 'start' | 'end'): number {
  const exposure = exposures[face];
  if (exposure.kind === 'temperature') return 0;
  if (exposure.kind !== 'film') return Infinity;
  // By the flux that one kelvin drives: the surroundings are as good a place to look as any.
  const conductances = instantsOf(exposure, start, end).map(({ outside, flux }) => flux(outside[0]) - flux(outside[0] + 1));
  return 1 / Math.min(...conductances);
}

/** Stage by stage what a source adds in its own layer: no more than it would without losses, nor than in a steady state. */
function riseBySources(layers: readonly WallLayer[], cycle: LaidCycle, range: TemperatureRange): Rise {
  const rise = { heating: 0, cooling: 0 };
  for (const stage of cycle.stages) {
    const out = Math.min(...FACES.map((face) => resistanceToOutside(stage, face))) + resistanceOf(layers);
    let [heating, cooling] = [0, 0];
    for (const source of stage.sources) {
      const { thickness, curves, initial } = layers[source.layer];
      const before = sumOver(layers.slice(0, source.layer), (layer) => layer.thickness);
      const powers = powersOf(source, [before, before + thickness], stage, range);
      const duration = stage.end - stage.start;
      const riseOf = (power: number): number => power * Math.min(duration / curves.heatCapacity(initial), thickness * out);
      heating = Math.max(heating, riseOf(Math.max(0, ...powers)));
      cooling = Math.max(cooling, riseOf(Math.max(0, ...powers.map((power) => -power))));
    }
    rise.heating += heating;
    rise.cooling += cooling;
  }
  return rise;
}

/** Places, temperatures and times at which the expression of a source is looked at. */
const PARTS = 8;

/** Powers of a source that occur in a stage between two depths (m), W/m³. */
function powersOf(
  { power }: LaidSource,
  [from, to]: readonly [number, number],
  { start, end }: LaidStage,
  range: TemperatureRange,
): number[] {
  if (!('expression' in power)) return power.value;
  const evaluate = evaluatorOf(power.expression, SOURCE_VARIABLES);
  const parts = Array.from({ length: PARTS + 1 }, (_, i) => i / PARTS);
  const powers: number[] = [];
  for (const t of parts) {
    for (const x of parts) {
      for (const w of parts) {
        const time = start + t * (end - start);
        const temperature = range.lowest + w * (range.highest - range.lowest);
        powers.push(evaluate([temperature, from + x * (to - from), time - power.stageStart, time]));
      }
    }
  }
  return powers.filter((value) => Number.isFinite(value));
}

/** What the reactions add without any loss. */
function riseByReactions(layers: readonly WallLayer[]): Rise {
  const rises = layers.map(({ reactionHeat, curves, initial }) => reactionHeat / curves.heatCapacity(initial));
  return { heating: Math.max(0, ...rises), cooling: Math.max(0, ...rises.map((rise) => -rise)) };
}
