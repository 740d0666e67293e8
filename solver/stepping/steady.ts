/** The steady state of a plan's part under given exposures and sources. */
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
import { FACES, layState, type LaidCycle, type LaidStage, type Project, type Stage } from '../model';
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

/** Elements a layer of the grid that a steady state is worked out on by itself. */
const ELEMENTS = 40;

/**
 * The state in which the part of a plan stays. Reactions are left out: in a steady state they are over. Throws RangeError where
 * crossCheck would have found a problem.
 */
export function steadyState(project: Project, under: SteadyUnder): SteadyState {
  const cycle = laidAlone(project, under);
  const layers = inertLayers(project, cycle);
  const settings = { scheme: 'implicit', accuracy: 1, grid: { nodes: ELEMENTS + 1 } } as const;
  return steadyOn(layers, gridOf(settings, layers, cycle, temperatureRange(layers, cycle), project.part), cycle);
}

/** The steady state that a plan starts from, on a grid of its own or a given one, as a profile a layer; or why there is none. */
export function steadyStart(
  project: Project,
  exposures: SteadyUnder['exposures'],
  grid?: WallGrid,
): { kind: 'start'; profiles: Profile[] } | { kind: 'none'; message: string } {
  const cycle = laidAlone(project, { exposures });
  const state = grid === undefined ? steadyState(project, { exposures }) : steadyOn(inertLayers(project, cycle), grid, cycle);
  if (state.kind === 'none') return state;
  const { position, layerStart } = state.points;
  const profiles = project.part.layers.map((_, layer): Profile => {
    const [first, end] = [layerStart[layer], layerStart[layer + 1]];
    return Array.from({ length: end - first }, (_, i) => [position[first + i] - position[first], state.temperature[first + i]]);
  });
  return { kind: 'start', profiles };
}

function laidAlone(project: Project, under: SteadyUnder): LaidCycle {
  const stage = layState(project, under);
  return { stages: [stage], end: stage.end, setPoint: stage.setPoint };
}

/** The layers at a guess of their temperature; changes and reactions of materials are left out, as they have no part in it. */
function inertLayers(project: Project, { stages: [stage] }: LaidCycle): WallLayer[] {
  const met = FACES.flatMap((face) => instantOf(stage.exposures[face], stage.start, 'after').outside);
  const temperature = met.length === 0 ? 20 : met.reduce((sum, value) => sum + value, 0) / met.length;
  const materials = project.materials.map(({ latent: _latent, reaction: _reaction, ...material }) => material);
  return wallLayers({ ...project, materials, initial: { temperature } });
}

function steadyOn(layers: readonly WallLayer[], grid: WallGrid, cycle: LaidCycle): SteadyState {
  const [stage] = cycle.stages;
  const lacking = whatLacks(stage);
  if (lacking !== null) return { kind: 'none', message: lacking };
  const system = new WallSystem(layers, grid, cycle, grid.kind === 'nodes' ? 'fourthOrder' : 'plain');
  const unknowns = system.initial();
  system.enter(
    { stage: 0, from: stage.start, to: stage.end },
    unknowns,
    new Float64Array(system.size),
    new Float64Array(system.heats),
  );
  const found = solveSteady(system, unknowns, stage.start, paceOf(layers));
  const points = fieldPoints(grid);
  if (found.kind === 'none') {
    const point = system.pointUnknown.indexOf(found.row);
    const layer = points.layerStart.findIndex((first) => first > point) - 1;
    const where = `${layerNamed(layers[layer].name)}, ${depth(points.position[point])}`;
    const what = found.finite ? `still changed by ${figure(found.kelvin)} K` : 'became no finite number';
    return {
      kind: 'none',
      message:
        `No steady state was found: at ${where}, the temperature ${what}. Heat given off inside may rise faster with ` +
        `temperature than it can leave; check the sources, and the values of that layer and of the exposures.`,
    };
  }
  const temperature = new Float64Array(points.position.length);
  system.report(unknowns, stage.start, temperature);
  system.evaluate(unknowns, stage.start);
  return { kind: 'steady', points, temperature, faceRate: [system.rates[0], system.rates[1]] };
}

/** Why there cannot be a steady state, or null. */
function whatLacks({ exposures }: LaidStage): string | null {
  const open = FACES.some((face) => exposures[face].kind === 'temperature' || exposures[face].kind === 'film');
  if (open) return null;
  return 'There is no steady state: no face meets a temperature, a film or radiation, so heat has nowhere to go.';
}

/** A time much shorter than that in which the part as a whole follows its surroundings, s. */
function paceOf(layers: readonly WallLayer[]): number {
  const capacity = layers.reduce((sum, { thickness, curves, initial }) => sum + thickness * curves.heatCapacity(initial), 0);
  const resistance = layers.reduce((sum, { thickness, curves, initial }) => sum + thickness / curves.conductivity(initial), 0);
  return 0.01 * capacity * resistance;
}
