/** The steady state of a plan's part: under given exposures and sources, at the start of a plan, and after its end. */
import {
  fieldPoints,
  gridOf,
  temperatureRange,
  wallLayers,
  type FieldPoints,
  type Profile,
  type WallGrid,
  type WallLayer,
} from '../grid';
import { WallSystem } from '../heat';
import { instantOf } from '../materials';
import { FACES, layCycle, layState, type LaidStage, type Project, type Stage } from '../model';
import { solveSteady } from './steadySolve';
import { depth, figure, layerNamed } from './words';

export type SteadyState =
  | {
      readonly kind: 'steady';
      readonly points: FieldPoints;
      /** One a point, °C. */
      readonly temperature: Float64Array;
      /** Heat into the part through its start and end face, W per basis. */
      readonly faceRate: readonly [start: number, end: number];
    }
  /** Why there is none, where it went wrong, and what to look at. */
  | { readonly kind: 'none'; readonly message: string };

/** What a steady state is that of: exposures and sources; their schedules count at their first value. */
export type SteadyUnder = Pick<Stage, 'exposures' | 'sources'>;

/**
 * The state in which the part of a plan stays. Reactions are left out: in a steady state they are over. Throws RangeError where
 * crossCheck would have found a problem.
 */
export function steadyState(project: Project, under: SteadyUnder): SteadyState {
  const stage = layState(project, under);
  return steadyIn(project, stage, stage.start, null);
}

/**
 * The state that the part of a plan comes to in the end if everything stays as the last stage leaves it. Reactions are left
 * out. Throws RangeError where crossCheck would have found a problem.
 */
export function steadyAtEnd(project: Project): SteadyState {
  const { stages, end } = layCycle(project);
  return steadyIn(project, stages[stages.length - 1], end, null);
}

/** The steady state that a plan starts from, on a given grid or one of its own, as a profile a layer; or why there is none. */
export function steadyStart(
  project: Project,
  exposures: SteadyUnder['exposures'],
  grid: WallGrid | null,
): { kind: 'start'; profiles: Profile[] } | { kind: 'none'; message: string } {
  const stage = layState(project, { exposures });
  const state = steadyIn(project, stage, stage.start, grid);
  if (state.kind === 'none') return state;
  const { position, layerStart } = state.points;
  const profiles = project.part.layers.map((_, layer): Profile => {
    const [first, end] = [layerStart[layer], layerStart[layer + 1]];
    return Array.from({ length: end - first }, (_, i) => [position[first + i] - position[first], state.temperature[first + i]]);
  });
  return { kind: 'start', profiles };
}

/** Elements a layer where no grid is given: without a source the field is exact at the nodes of any. */
const ELEMENTS = 40;

/** The steady state under a stage as it is at a time. */
function steadyIn(project: Project, stage: LaidStage, time: number, given: WallGrid | null): SteadyState {
  const open = FACES.some((face) => stage.exposures[face].kind === 'temperature' || stage.exposures[face].kind === 'film');
  if (!open) {
    const message = 'There is no steady state: no face meets a temperature, a film or radiation, so heat has nowhere to go.';
    return { kind: 'none', message };
  }
  const cycle = { stages: [stage], end: stage.end, setPoint: stage.setPoint };
  const layers = inertLayers(project, stage, time);
  const settings = { scheme: 'implicit', accuracy: 1, grid: { nodes: ELEMENTS + 1 } } as const;
  const grid = given ?? gridOf(settings, layers, cycle, temperatureRange(layers, cycle), project.part);
  const system = new WallSystem(layers, grid, cycle, grid.kind === 'nodes' ? 'fourthOrder' : 'plain');
  const unknowns = system.initial();
  const [stored, through] = [new Float64Array(system.size), new Float64Array(system.heats)];
  system.enter({ stage: 0, from: stage.start, to: stage.end }, unknowns, stored, through);
  const found = solveSteady(system, unknowns, time, paceOf(layers));
  const points = fieldPoints(grid);
  if (found.kind === 'none') {
    const place = system.placeOf(found.row);
    const where = `${layerNamed(layers[place.layer].name)}, ${depth(place.depth)}`;
    const what = found.finite ? `still changed by ${figure(found.kelvin)} K` : 'became no finite number';
    const message =
      `No steady state was found: at ${where}, the temperature ${what}. Heat given off inside may rise faster with ` +
      `temperature than it can leave; check the sources, and the values of that layer and of the exposures.`;
    return { kind: 'none', message };
  }
  const temperature = new Float64Array(points.position.length);
  system.report(unknowns, time, temperature);
  system.evaluate(unknowns, time);
  return { kind: 'steady', points, temperature, faceRate: [system.rates[0], system.rates[1]] };
}

/** The layers at a guess of their temperature; changes and reactions of materials are left out, as they have no part in it. */
function inertLayers(project: Project, { exposures }: LaidStage, time: number): WallLayer[] {
  const met = FACES.flatMap((face) => instantOf(exposures[face], time, 'after').outside);
  const temperature = met.reduce((sum, value) => sum + value, 0) / met.length;
  const materials = project.materials.map(({ latent: _latent, reaction: _reaction, ...material }) => material);
  return wallLayers({ ...project, materials, initial: { temperature } });
}

/** A time much shorter than that in which the part as a whole follows its surroundings, s. */
function paceOf(layers: readonly WallLayer[]): number {
  const sum = (of: (layer: WallLayer) => number): number => layers.reduce((total, layer) => total + of(layer), 0);
  const capacity = sum(({ thickness, curves, initial }) => thickness * curves.heatCapacity(initial));
  return 0.01 * capacity * sum(({ thickness, curves, initial }) => thickness / curves.conductivity(initial));
}
