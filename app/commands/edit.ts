/** Immutable edits of lists and paths. All give back the same object when nothing changes. */
import { placeOf, type Path, type Project } from '../../solver/model';
import type { Entered } from './command';

type Tree = Record<string | number, unknown>;

/** A copy of `tree` with `value` at `path`; everything off the path is shared. `undefined` removes an optional key. */
export function writeAt<T>(tree: T, path: Path, value: unknown): T {
  const [key, ...rest] = path;
  if (key === undefined) return value as T;
  const old = (tree as Tree)[key];
  const next = rest.length === 0 ? value : writeAt(old ?? {}, rest, value);
  if (Object.is(old, next)) return tree;
  const copy = (Array.isArray(tree) ? [...tree] : { ...tree }) as Tree;
  if (next === undefined) delete copy[key];
  else copy[key] = next;
  return copy as T;
}

/** Writes an entered number, and remembers what was typed for it. */
export function enterAt(project: Project, path: Path, entered: Entered): Project {
  const after = writeAt(project, path, entered.value);
  if (entered.typed === undefined) return after;
  return writeAt(after, ['typed', placeOf(path)], entered.typed);
}

/** The list with `item` after the one at `index`; −1 puts it first. */
export const insertAfter = <T>(list: readonly T[], index: number, item: T): T[] => [
  ...list.slice(0, index + 1),
  item,
  ...list.slice(index + 1),
];

/** The list with the item at `index` moved by `by` places, as far as the list goes. */
export function moveItem<T>(list: T[], index: number, by: number): T[] {
  const to = Math.min(Math.max(index + by, 0), list.length - 1);
  if (index < 0 || to === index) return list;
  const rest = list.filter((_, at) => at !== index);
  return insertAfter(rest, to - 1, list[index]);
}

export const indexOfId = (list: readonly { id: string }[], id: string): number => list.findIndex((item) => item.id === id);

/** The list with the item of that id replaced by what `change` makes of it. */
export function changeById<T extends { id: string }>(list: T[], id: string, change: (item: T) => T): T[] {
  const index = indexOfId(list, id);
  return index < 0 ? list : writeAt(list, [index], change(list[index]));
}
