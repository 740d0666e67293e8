/** How a heat source is given, and each as the next. */
import type { Source } from '../../solver/model';

export type SourceKind = 'none' | 'constant' | 'expression' | 'ramps';

export const SOURCE_KINDS: readonly { value: SourceKind; label: string }[] = [
  { value: 'none', label: 'none' },
  { value: 'constant', label: 'constant' },
  { value: 'expression', label: 'expression' },
  { value: 'ramps', label: 'own ramps' },
];

export function sourceKind(power: Source['power'] | null): SourceKind {
  if (power === null) return 'none';
  if (typeof power === 'number') return 'constant';
  return 'expression' in power ? 'expression' : 'ramps';
}

const USUAL = 1000; // W/m³

export function sourceOfKind(kind: SourceKind): Source['power'] | null {
  if (kind === 'none') return null;
  if (kind === 'ramps') return { start: USUAL, segments: [] };
  return kind === 'constant' ? USUAL : { expression: String(USUAL) };
}
