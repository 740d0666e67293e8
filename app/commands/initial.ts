/** The state at the start: one temperature, one for each layer, a profile over depth, or a steady state. */
import type { Initial, Layer, Project, Stage } from '../../solver/model';
import { partThickness } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { enterAt, writeAt } from './edit';

/** The temperature a layer starts from, °C; NaN where the plan gives it none of its own. */
export function startTemperature(initial: Initial, layer: string): number {
  if ('temperature' in initial) return initial.temperature;
  if (!('layers' in initial)) return Number.NaN;
  return initial.layers.find((entry) => entry.layer === layer)?.temperature ?? Number.NaN;
}

/** Path of the number that `startTemperature` gives; of the whole state where it gives none. */
export function startTemperaturePath(initial: Initial, layer: string): (string | number)[] {
  if ('temperature' in initial) return ['initial', 'temperature'];
  if (!('layers' in initial)) return ['initial'];
  return ['initial', 'layers', initial.layers.findIndex((entry) => entry.layer === layer), 'temperature'];
}

const ROOM_C = 20;

/** A temperature to begin another kind of start from: the one the layer has, or that of the profile at the start face. */
function nearStart(initial: Initial, layer: string): number {
  if ('profile' in initial) return initial.profile[0][1];
  const own = startTemperature(initial, layer);
  return Number.isFinite(own) ? own : ROOM_C;
}

/** One temperature for the whole part: that of the first layer. */
export const makeStartUniform = (): Command => ({
  name: 'Start with one temperature',
  apply: (project) =>
    'temperature' in project.initial
      ? project
      : writeAt(project, ['initial'], { temperature: nearStart(project.initial, project.part.layers[0].id) }),
});

/** A temperature for each layer, at first the one they share. */
export const makeStartPerLayer = (): Command => ({
  name: 'Start with a temperature for each layer',
  apply: (project) => ('layers' in project.initial ? project : writeAt(project, ['initial'], perLayer(project))),
});

const perLayer = (project: Project): Initial => ({
  layers: project.part.layers.map((layer) => ({ layer: layer.id, temperature: nearStart(project.initial, layer.id) })),
});

/** A profile over depth: at first straight from the start of the first layer to that of the last. */
export const makeStartProfile = (): Command => ({
  name: 'Start with a profile over depth',
  apply: (project) => {
    if ('profile' in project.initial) return project;
    const { layers } = project.part;
    const [first, last] = [layers[0], layers[layers.length - 1]].map(({ id }) => nearStart(project.initial, id));
    const depth = Number(partThickness(project.part).toPrecision(6));
    return writeAt(project, ['initial'], {
      profile: [
        [0, first],
        [depth, last],
      ],
    });
  },
});

/** Points [depth in m, °C] of the profile at the start. */
export const setStartProfile = (profile: [number, number][]): Command => ({
  name: `Profile at the start, ${profile.length} points`,
  apply: (project) => ('profile' in project.initial ? writeAt(project, ['initial', 'profile'], profile) : project),
});

/** The steady state under what the faces meet in a stage, their schedules at their first value. */
export const makeStartSteady = (stage: Stage): Command => ({
  name: `Start from the steady state of ${called(stage, 'stage')}`,
  apply: (project) => writeAt(project, ['initial'], { steady: stage.exposures }),
});

/** The start temperature of a layer, or of the whole part where the start is uniform. */
export const setStartTemperature = (layer: Layer, entered: Entered): Command => ({
  name: `Start temperature of ${called(layer, 'layer')} to ${entered.text}`,
  apply: (project) => {
    const { initial } = project;
    if ('profile' in initial || 'steady' in initial) return project;
    if ('layers' in initial && !initial.layers.some((entry) => entry.layer === layer.id)) {
      return writeAt(project, ['initial', 'layers'], [...initial.layers, { layer: layer.id, temperature: entered.value }]);
    }
    return enterAt(project, startTemperaturePath(initial, layer.id), entered);
  },
});
