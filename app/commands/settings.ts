/** Edits of how a plan is solved. */
import type { GridSetting, SchemeName } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { enterAt, indexOfId, writeAt } from './edit';

export const SCHEME_NAMES: Record<SchemeName, string> = {
  automatic: 'automatic',
  explicit: 'explicit',
  implicit: 'implicit (backward Euler)',
  crankNicolson: 'Crank–Nicolson',
};

/** Another scheme; one that needs a step and has none gets `step`, s. */
export const setScheme = (scheme: SchemeName, step: number): Command => ({
  name: `Scheme to ${SCHEME_NAMES[scheme]}`,
  apply: (project) => {
    const settings = { ...project.settings, scheme };
    const stepMissing = scheme !== 'automatic' && settings.step === undefined;
    if (project.settings.scheme === scheme && !stepMissing) return project;
    return { ...project, settings: stepMissing ? { ...settings, step } : settings };
  },
});

export const setAccuracy = (entered: Entered): Command => ({
  name: `Accuracy to ${entered.text}`,
  apply: (project) => enterAt(project, ['settings', 'accuracy'], entered),
});

export const setStep = (entered: Entered): Command => ({
  name: `Step to ${entered.text}`,
  apply: (project) => enterAt(project, ['settings', 'step'], entered),
});

export const setDampedSteps = (count: number): Command => ({
  name: `Damped steps to ${count}`,
  apply: (project) => writeAt(project, ['settings', 'dampedSteps'], count),
});

export const setGrid = (grid: GridSetting, text: string): Command => ({
  name: `Grid to ${text}`,
  apply: (project) => writeAt(project, ['settings', 'grid'], grid),
});

/** Another count of nodes or cells in one layer; an automatic grid has none. */
export const setLayerCount = (layer: { id: string; name: string }, count: number): Command => ({
  name: `Grid of ${called(layer, 'layer')} to ${count}`,
  apply: (project) => {
    const { grid } = project.settings;
    const index = indexOfId(project.part.layers, layer.id);
    if (grid === 'automatic' || index < 0) return project;
    const key = 'nodes' in grid ? 'nodes' : 'cells';
    const counts = 'nodes' in grid ? grid.nodes : grid.cells;
    const each = Array.isArray(counts) ? [...counts] : project.part.layers.map(() => counts);
    each[index] = count;
    return writeAt(project, ['settings', 'grid'], { [key]: each });
  },
});
