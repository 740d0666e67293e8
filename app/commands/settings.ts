/** Edits of how a plan is solved. */
import type { GridSetting, SchemeName } from '../../solver/model';
import type { Command, Entered } from './command';
import { enterAt, writeAt } from './edit';

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
