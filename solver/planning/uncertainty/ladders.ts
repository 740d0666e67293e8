/**
 * Which other runs tell the error of one: ladders of refinement.
 *
 * The automatic scheme has one number for grid and step together, its accuracy, and so one ladder: grid and tolerance are
 * refined together. The schemes of the textbooks have a grid and a step, and a ladder each. On a grid that the plan fixes,
 * the automatic scheme has a ladder of grids and one of tolerances.
 */
import type { GridSetting, Project, RunResult } from '../../model';

/** A run on a ladder; `size` is what is refined, relative to the run whose error is sought (1). */
export interface Rung {
  readonly size: number;
  readonly project: Project;
}

/** Runs from coarse to fine, evenly apart: each size is the same part of the one before. */
export interface Ladder {
  readonly of: 'accuracy' | 'grid' | 'step';
  /** The order in theory: what the error is proportional to is size^order. */
  readonly order: number;
  readonly rungs: readonly Rung[];
}

/** Accuracies are refined by three at a time: the grid of fourth order then by 3^¼. */
const ACCURACY_RATIO = 3;

/** The ladders of a run that has ended; its own result tells the grid that it was on. */
export function laddersOf(project: Project, base: RunResult): Ladder[] {
  const { scheme, grid, accuracy } = project.settings;
  if (scheme === 'automatic') {
    const accuracies = [ACCURACY_RATIO, 1, 1 / ACCURACY_RATIO, 1 / ACCURACY_RATIO ** 2];
    const ladder: Ladder = {
      of: 'accuracy',
      order: 1,
      rungs: accuracies.map((size) => ({ size, project: withSettings(project, { accuracy: accuracy * size }) })),
    };
    return grid === 'automatic' ? [ladder] : [ladder, gridLadder(project, base, {})];
  }
  return scheme === 'explicit' ? explicitLadders(project, base) : implicitLadders(project, base);
}

const withSettings = (project: Project, settings: Partial<Project['settings']>): Project => ({
  ...project,
  settings: { ...project.settings, ...settings },
});

function implicitLadders(project: Project, base: RunResult): Ladder[] {
  const order = project.settings.scheme === 'implicit' ? 1 : 2;
  return [stepLadder(project, order, [2, 1, 1 / 2]), gridLadder(project, base, {})];
}

/** Half the spacing takes a quarter of the step, so the grids are compared at that step; it is never larger than the plan's. */
function explicitLadders(project: Project, base: RunResult): Ladder[] {
  return [stepLadder(project, 1, [1, 1 / 2, 1 / 4]), gridLadder(project, base, { step: stepOf(project) / 4 })];
}

const stepOf = ({ settings }: Project): number => settings.step ?? NaN;

const stepLadder = (project: Project, order: number, sizes: readonly number[]): Ladder => ({
  of: 'step',
  order,
  rungs: sizes.map((size) => ({
    size,
    project: size === 1 ? project : withSettings(project, { step: size * stepOf(project) }),
  })),
});

function gridLadder(project: Project, base: RunResult, settings: Partial<Project['settings']>): Ladder {
  const rungs: Rung[] = [];
  for (const size of [2, 1, 1 / 2]) {
    const grid = gridOfSize(project, base, size);
    if (grid !== null) rungs.push({ size, project: withSettings(project, { ...settings, grid }) });
  }
  return { of: 'grid', order: 2, rungs };
}

/** The grid of a run with elements `size` times as long; null where layers have too few of them to be halved. */
function gridOfSize(project: Project, base: RunResult, size: number): GridSetting | null {
  const { grid } = project.settings;
  const { layerStart } = base.frames;
  const cells = grid !== 'automatic' && 'cells' in grid;
  const counts = project.part.layers.map((_, i) => {
    if (cells) return countIn(grid.cells, i);
    return grid !== 'automatic' && 'nodes' in grid ? countIn(grid.nodes, i) - 1 : layerStart[i + 1] - layerStart[i] - 1;
  });
  const wanted = counts.map((count) => count / size);
  if (wanted.some((count) => !Number.isInteger(count) || count < 2)) return null;
  return cells ? { cells: wanted } : { nodes: wanted.map((count) => count + 1) };
}

const countIn = (counts: number | number[], layer: number): number => (typeof counts === 'number' ? counts : counts[layer]);
