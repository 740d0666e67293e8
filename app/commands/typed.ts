/** The map of what the person typed, by path of the number it stands for. */
import { placeOf, valueAt, type Path, type Project } from '../../solver/model';

/** The path that `placeOf` words: "part.layers[1].thickness" → ['part', 'layers', 1, 'thickness']. */
export const parsePlace = (place: string): Path =>
  [...place.matchAll(/([^.[\]]+)|\[(\d+)\]/g)].map((part) => (part[2] === undefined ? part[1] : Number(part[2])));

/**
 * Drops texts whose number is gone or has changed. A text that is new in `after` belongs to the edit itself and stays;
 * one that slid to another row with an equal number still says the truth and stays too.
 */
export function keepTyped(before: Project, after: Project): Project {
  const { typed, ...rest } = after;
  if (typed === undefined) return after;
  const kept = Object.entries(typed).filter(([place, text]) => {
    const path = parsePlace(place);
    const number = valueAt(after, path);
    if (typeof number !== 'number') return false;
    return before.typed?.[place] !== text || valueAt(before, path) === number;
  });
  if (kept.length === Object.keys(typed).length) return after;
  return kept.length === 0 ? rest : { ...rest, typed: Object.fromEntries(kept) };
}

/** What was typed for the number at a path, if it is kept. */
export const typedAt = (project: Project, path: Path): string | undefined => project.typed?.[placeOf(path)];
