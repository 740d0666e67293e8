/** One battery, every scheme: the settings that a case is solved with. */
import type { GridSetting, Project, Settings } from '../../solver/model';
import { createRun } from '../../solver/stepping';

export interface SchemeRow {
  name: string;
  /** The plan under this scheme. */
  under: (project: Project) => Project;
}

export interface Battery {
  /** Wanted accuracy of the automatic scheme, K. */
  accuracy: number;
  /** Grid of the other schemes. */
  grid: GridSetting;
  /** Their steps, s; the explicit scheme takes 0.9 of its limit, or this if that is less. */
  implicit: number;
  crankNicolson: number;
  explicit?: number;
}

/** A row for every scheme. */
export const everyScheme = (battery: Battery): SchemeRow[] => [
  automatic(battery.accuracy),
  implicit(battery.implicit, battery.grid),
  crankNicolson(battery.crankNicolson, battery.grid),
  explicit(battery.grid, battery.explicit),
];

export const automatic = (accuracy: number): SchemeRow =>
  row(`automatic, ${accuracy} K`, { scheme: 'automatic', accuracy, grid: 'automatic' });

export const implicit = (step: number, grid: GridSetting): SchemeRow =>
  row(`implicit, ${step} s, ${gridName(grid)}`, { scheme: 'implicit', step, grid });

export const crankNicolson = (step: number, grid: GridSetting): SchemeRow =>
  row(`Crank–Nicolson, ${step} s, ${gridName(grid)}`, { scheme: 'crankNicolson', step, grid });

export const explicit = (grid: GridSetting, longest = Infinity): SchemeRow => ({
  name: `explicit, 0.9 of its limit, ${gridName(grid)}`,
  under: (project) => {
    const scheme = { ...project, settings: { ...project.settings, scheme: 'explicit' as const, grid, step: 1e-12 } };
    const limit = createRun(scheme, () => undefined).stability?.explicit_limit_s ?? Infinity;
    return { ...scheme, settings: { ...scheme.settings, step: Math.min(0.9 * limit, longest) } };
  },
});

const row = (name: string, settings: Partial<Settings>): SchemeRow => ({
  name,
  under: (project) => ({ ...project, settings: { ...project.settings, ...settings } }),
});

const gridName = (grid: GridSetting): string => {
  if (grid === 'automatic') return 'automatic grid';
  return 'nodes' in grid ? `${String(grid.nodes)} nodes` : `${String(grid.cells)} cells`;
};
