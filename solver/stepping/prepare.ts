import {
  equalGrid,
  fieldPoints,
  gridOf,
  temperatureRange,
  wallLayers,
  type FieldPoints,
  type Shape,
  type WallGrid,
  type WallLayer,
} from '../grid';
import { layCycle, type LaidCycle, type Project } from '../model';
import { intervalsOf, type CycleInterval } from './intervals';
import type { SchemeSettings } from './makeScheme';
import { steadyStart } from './steady';
import { layerNamed } from './words';

/** A plan made ready to run: everything that does not change while it runs. */
export interface Prepared {
  readonly cycle: LaidCycle;
  readonly intervals: readonly CycleInterval[];
  readonly layers: readonly WallLayer[];
  readonly grid: WallGrid;
  readonly points: FieldPoints;
  readonly settings: SchemeSettings;
  /** Accuracy that the plan asks for, K; that of the settings may be coarser. */
  readonly wantedAccuracy: number;
  /** Why the numbers of the plan cannot be computed with; the grid is then a stand-in. Null: they can. */
  readonly unusable: string | null;
}

/** Below this part of the range of temperatures an accuracy lies in the rounding of numbers with sixteen digits. */
const FINEST_ACCURACY = 1e-8;
/** Unknowns that a run holds at most. */
const MOST_NODES = 200_000;

/** Makes a checked plan ready. Throws RangeError where crossCheck would have found a problem. */
export function prepare(project: Project): Prepared {
  const cycle = layCycle(project);
  const start = startOf(project);
  const layers = start.layers;
  const range = temperatureRange(layers, cycle);
  const wantedAccuracy = project.settings.accuracy;
  const accuracy = Math.max(wantedAccuracy, FINEST_ACCURACY * (range.highest - range.lowest));
  const { kind, innerRadius } = project.part;
  const shape: Shape = { kind, innerRadius };
  const wanted = gridOf({ ...project.settings, accuracy }, layers, cycle, range, shape);
  const unusable = start.lacking ?? whyUnusable(layers, wanted);
  const standIn = (): WallGrid => equalGrid('nodes', wanted.thickness, new Array<number>(layers.length).fill(1), shape);
  const grid = unusable === null ? wanted : standIn();
  return {
    cycle,
    intervals: intervalsOf(cycle),
    layers: unusable === null ? settled(project, layers, grid) : layers,
    grid,
    points: fieldPoints(grid),
    settings: schemeSettings(project, accuracy),
    wantedAccuracy,
    unusable,
  };
}

/** The layers as they start; a steady state at the start comes from a grid of its own, until there is the plan's. */
function startOf(project: Project): { layers: WallLayer[]; lacking: string | null } {
  if (!('steady' in project.initial)) return { layers: wallLayers(project), lacking: null };
  const start = steadyStart(project, project.initial.steady);
  if (start.kind === 'start') return { layers: wallLayers(project, start.profiles), lacking: null };
  return { layers: wallLayers({ ...project, initial: { temperature: 20 } }), lacking: start.message };
}

/** The layers with a steady state at the start as the plan's own grid has it: under the same exposures nothing then moves. */
function settled(project: Project, layers: WallLayer[], grid: WallGrid): WallLayer[] {
  if (!('steady' in project.initial)) return layers;
  const start = steadyStart(project, project.initial.steady, grid);
  return start.kind === 'start' ? wallLayers(project, start.profiles) : layers;
}

function schemeSettings({ settings }: Project, accuracy: number): SchemeSettings {
  const { scheme, step, dampedSteps } = settings;
  if (scheme === 'automatic') return { scheme, accuracy };
  if (step === undefined) throw new RangeError('a scheme of the textbooks needs a step');
  return scheme === 'crankNicolson' ? { scheme, step, dampedSteps } : { scheme, step };
}

/** What keeps a plan's numbers from being computed with, in words; null: nothing does. */
function whyUnusable(layers: readonly WallLayer[], grid: WallGrid): string | null {
  const nodes = grid.elements.reduce((sum, lengths) => sum + lengths.length + 1, 0);
  if (nodes > MOST_NODES)
    return `The grid would have ${nodes} nodes; at most ${MOST_NODES} can be held. Ask for fewer in a layer.`;
  const { position, layerStart } = fieldPoints(grid);
  const usable = (value: number): boolean => value > 0 && value < Infinity;
  for (let index = 0; index < layers.length; index++) {
    const { name, curves, initial } = layers[index];
    const positions = position.subarray(layerStart[index], layerStart[index + 1]);
    const rising = positions.every((depth, i) => i === 0 || depth > positions[i - 1]);
    const computable = grid.elements[index].every(
      (length) =>
        usable(length) && usable(curves.heatCapacity(initial) * length) && usable(curves.conductivity(initial) / length),
    );
    if (!rising || !computable || positions.length < 2) {
      return `The thickness or the material of ${layerNamed(name)} is too small or too large, by itself or beside the others, to compute with.`;
    }
  }
  return null;
}
