/** The grid setting as text: one count for all layers, or one a layer. */
import type { GridSetting } from '../../solver/model';

export type GridKind = 'automatic' | 'nodes' | 'cells';

export const gridKind = (grid: GridSetting): GridKind => (grid === 'automatic' ? grid : 'nodes' in grid ? 'nodes' : 'cells');

export function gridCounts(grid: GridSetting): string {
  if (grid === 'automatic') return '';
  const counts = 'nodes' in grid ? grid.nodes : grid.cells;
  return Array.isArray(counts) ? counts.join(', ') : String(counts);
}

const LEAST = 2;
const MOST = 100000;

/** The counts that a text says; a sentence where it says none. */
export function readCounts(text: string, layers: number): number | number[] | string {
  const parts = text.split(/[,;\s]+/).filter((part) => part !== '');
  const numbers = parts.map(Number);
  if (numbers.length === 0) return `Say how many in each layer: one number, or ${layers} of them.`;
  const odd = parts.find((_, index) => !Number.isInteger(numbers[index]));
  if (odd !== undefined) return `“${odd}” is not a whole number.`;
  const outside = numbers.find((number) => number < LEAST || number > MOST);
  if (outside !== undefined) return `${outside} is outside ${LEAST} to ${MOST}.`;
  if (numbers.length === 1) return numbers[0];
  return numbers.length === layers ? numbers : `One number, or one a layer: ${layers}, got ${numbers.length}.`;
}
