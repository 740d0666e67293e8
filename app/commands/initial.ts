/** The state at the start: one temperature, or one for each layer. */
import type { Initial, Layer, Project } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { enterAt, writeAt } from './edit';

/** The temperature a layer starts from, °C; NaN where the plan gives none. */
export function startTemperature(initial: Initial, layer: string): number {
  if ('temperature' in initial) return initial.temperature;
  return initial.layers.find((entry) => entry.layer === layer)?.temperature ?? Number.NaN;
}

/** Path of the number that `startTemperature` gives. */
export function startTemperaturePath(initial: Initial, layer: string): (string | number)[] {
  if ('temperature' in initial) return ['initial', 'temperature'];
  return ['initial', 'layers', initial.layers.findIndex((entry) => entry.layer === layer), 'temperature'];
}

/** One temperature for the whole part: that of the first layer. */
export const makeStartUniform = (): Command => ({
  name: 'Start with one temperature',
  apply: (project) =>
    'temperature' in project.initial
      ? project
      : writeAt(project, ['initial'], { temperature: startTemperature(project.initial, project.part.layers[0].id) }),
});

/** A temperature for each layer, at first the one they share. */
export const makeStartPerLayer = (): Command => ({
  name: 'Start with a temperature for each layer',
  apply: (project) => ('layers' in project.initial ? project : writeAt(project, ['initial'], perLayer(project))),
});

const perLayer = (project: Project): Initial => ({
  layers: project.part.layers.map((layer) => ({ layer: layer.id, temperature: startTemperature(project.initial, layer.id) })),
});

/** The start temperature of a layer, or of the whole part where the start is uniform. */
export const setStartTemperature = (layer: Layer, entered: Entered): Command => ({
  name: `Start temperature of ${called(layer, 'layer')} to ${entered.text}`,
  apply: (project) => {
    const { initial } = project;
    if ('layers' in initial && !initial.layers.some((entry) => entry.layer === layer.id)) {
      return writeAt(project, ['initial', 'layers'], [...initial.layers, { layer: layer.id, temperature: entered.value }]);
    }
    return enterAt(project, startTemperaturePath(initial, layer.id), entered);
  },
});
