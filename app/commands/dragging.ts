/** Edits made by hand on the pictures: layer edges, probes and set-points that are taken hold of and moved. */
import { FACES, partThickness, type Layer, type Place, type Project, type Segment } from '../../solver/model';
import { called, type Command } from './command';
import { indexOfId, writeAt } from './edit';
import { depthOf } from './probes';
import { rampAt, schedulePath } from './segments';

/**
 * Moves the far edge of a layer so that the layer becomes `thickness` thick. The edge alone moves: the layer after it gives
 * or takes the difference; at the end face the part grows or shrinks. Does nothing where a layer would be used up.
 */
export const moveEdge = (layer: Layer, thickness: number, text: string): Command => ({
  name: `Edge of ${called(layer, 'layer')} to ${text}`,
  apply: (project) => {
    const { layers } = project.part;
    const index = indexOfId(layers, layer.id);
    if (index < 0 || !(thickness > 0)) return project;
    const moved = writeAt(project, ['part', 'layers', index, 'thickness'], thickness);
    if (index === layers.length - 1) return moved;
    // Twelve digits: 0.076 − 0.001 is 0.075, not 0.07500000000000001.
    const rest = Number((layers[index].thickness + layers[index + 1].thickness - thickness).toPrecision(12));
    return rest > 0 ? writeAt(moved, ['part', 'layers', index + 1, 'thickness'], rest) : project;
  },
});

/**
 * The place of a probe that is dropped at a depth (m): a face or the near side of an edge within `reach` of it; else the
 * same kind of place it had, as long as that can say it; else a depth.
 */
export function placeNear(depth: number, layers: readonly Layer[], before: Place, reach: number): Place {
  const total = partThickness({ layers: [...layers] });
  const inside = Math.min(Math.max(depth, 0), total);
  const face = FACES.find((id) => Math.abs(inside - depthOf({ face: id }, layers)) <= reach);
  if (face !== undefined) return { face };
  for (const layer of layers.slice(0, -1)) {
    const edge = depthOf({ interface: layer.id, side: 'before' }, layers);
    if (Math.abs(inside - edge) <= reach) return { interface: layer.id, side: inside <= edge ? 'before' : 'after' };
  }
  if (!('fraction' in before)) return { depth: inside };
  if (before.layer === undefined) return { fraction: inside / total };
  const from = depthOf({ ...before, fraction: 0 }, layers);
  const to = depthOf({ ...before, fraction: 1 }, layers);
  return inside > from && inside < to ? { ...before, fraction: (inside - from) / (to - from) } : { depth: inside };
}

/** What is pulled at the end of a segment: the value reached, or how long it takes (s). */
export interface Pull {
  to?: number;
  length?: number;
}

/**
 * A segment pulled at its end. The number that was typed stays: pulled in value, a segment with a rate keeps its rate and
 * takes longer; pulled in time, it takes another rate. `from` is the value the segment starts from.
 */
export function pullSegment(segment: Segment, from: number, pull: Pull): Segment {
  if ('hold' in segment) return pull.length === undefined ? segment : { hold: pull.length };
  const to = pull.to ?? segment.to;
  if ('duration' in segment) return { to, duration: pull.length ?? segment.duration };
  const change = Math.abs(to - from);
  const rate = pull.length === undefined || pull.length <= 0 || change === 0 ? segment.rate : change / pull.length;
  return { to, rate };
}

/** Pulls a segment of a stage's set-point; `text` says how far for the undo list. */
export const pullSetPoint = (
  stage: { id: string; name: string },
  at: number,
  from: number,
  pull: Pull,
  text: string,
): Command => ({
  name: `Set-point of ${called(stage, 'stage')} to ${text}`,
  apply: (project: Project) => {
    const path = schedulePath(project, stage, 'setPoint');
    const segment = rampAt(project, stage, 'setPoint')?.segments[at];
    if (path === null || segment === undefined) return project;
    return writeAt(project, [...path, 'segments', at], pullSegment(segment, from, pull));
  },
});
