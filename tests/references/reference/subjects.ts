/** What requirements speak of, over a step of the reference: a node, an extreme of the field, a difference. */
import type { Project, Subject } from '../../../solver/model';
import type { Chain } from './chain';
import type { MarchedStep } from './march';

/** A scalar at a fraction of a step. */
export type Reading = (step: MarchedStep, fraction: number) => number;

export function readingOf(
  subject: Subject,
  project: Project,
  chain: Chain,
  nodeOf: (probe: string) => number | 'centre',
): Reading {
  if ('probe' in subject) {
    const node = nodeOf(subject.probe);
    if (node !== 'centre') return (step, fraction) => nodeAt(step, node, fraction);
    return (step, fraction) => centreAt(chain, (i) => nodeAt(step, i, fraction));
  }
  const field = new Float64Array(chain.depth.length);
  const whole = nodesFrom(chain, 0, chain.depth.length - 1);
  const fill = (step: MarchedStep, fraction: number): void => {
    for (let i = 0; i < field.length; i++) field[i] = nodeAt(step, i, fraction);
  };
  if ('point' in subject) {
    const sign = subject.point === 'hottest' ? 1 : -1;
    return (step, fraction) => {
      fill(step, fraction);
      return sign * highest(chain, field, whole, sign);
    };
  }
  const runs = subject.difference === 'part' ? [whole] : runsOfMaterial(project, chain);
  return (step, fraction) => {
    fill(step, fraction);
    return Math.max(...runs.map((run) => highest(chain, field, run, 1) + highest(chain, field, run, -1)));
  };
}

/** Cubic of Hermite through both ends. */
function nodeAt({ from, to, before, after, slopeBefore, slopeAfter }: MarchedStep, node: number, x: number): number {
  if (x === 0) return before[node];
  if (x === 1) return after[node];
  const length = to - from;
  const [a, b] = [before[node], after[node]];
  const [p, q] = [slopeBefore[node] * length, slopeAfter[node] * length];
  const z = 1 - x;
  return a * z * z * (1 + 2 * x) + b * x * x * (3 - 2 * x) + x * z * (p * z - q * x);
}

/** At the centre of a solid part, by the even parabola through the first two cells. */
function centreAt(chain: Chain, at: (node: number) => number): number {
  const [a, b] = [chain.depth[0] ** 2, chain.depth[1] ** 2];
  return (at(0) * b - at(1) * a) / (b - a);
}

/** Nodes of a bonded piece whose values are compared. */
type Run = readonly number[];

/**
 * The nodes between two, without those that only mark a probe: they lie on the straight line between their cells, where the
 * field bends.
 */
function nodesFrom({ links, volume }: Chain, from: number, to: number): Run {
  const nodes: number[] = [];
  for (let i = from; i <= to; i++) {
    const [before, after] = [links[i - 1], links[i]];
    const inside = i > from && i < to && 'substance' in before && 'substance' in after;
    const marks = inside && volume[i] === 0 && before.substance.material === after.substance.material;
    if (!marks) nodes.push(i);
  }
  return nodes;
}

/** Neighbouring layers of one material, bonded without resistance, are one piece. */
function runsOfMaterial({ part }: Project, chain: Chain): Run[] {
  const { layer, depth, links } = chain;
  const runs: { from: number; to: number }[] = [];
  for (let i = 0; i < depth.length; i++) {
    const { material } = part.layers[layer[i]];
    const last = runs.at(-1);
    const bonded = i > 0 && 'substance' in links[i - 1];
    if (last !== undefined && bonded && part.layers[layer[last.to]].material === material) last.to = i;
    // A node shared by two layers belongs to both.
    else runs.push({ from: bonded ? i - 1 : i, to: i });
  }
  return runs.map(({ from, to }) => nodesFrom(chain, from, to));
}

/** Highest value (of the field times `sign`) in a run of nodes, between nodes by the parabola through the highest three. */
function highest(chain: Chain, field: Float64Array, run: Run, sign: 1 | -1): number {
  let top = 0;
  for (let i = 1; i < run.length; i++) if (sign * field[run[i]] > sign * field[run[top]]) top = i;
  const value = sign * field[run[top]];
  if (top === 0 && run[0] === 0 && chain.solid) return Math.max(value, sign * centreAt(chain, (i) => field[i]));
  if (top === 0 || top === run.length - 1) return value;
  const step = (i: number): number => chain.depth[run[i + 1]] - chain.depth[run[i]];
  const rise = (i: number): number => sign * (field[run[i + 1]] - field[run[i]]);
  const bendAt = (i: number): number =>
    i <= 0 || i >= run.length - 1 ? 0 : (rise(i) / step(i) - rise(i - 1) / step(i - 1)) / (step(i - 1) + step(i));
  const bend = bendAt(top);
  // Beside a kink or a jump there is nothing between the nodes: only where the field bends alike all around is it a parabola.
  if (!(bend < 0) || Math.max(bendAt(top - 1), bendAt(top + 1)) > 0.5 * bend) return value;
  const [a, b] = [step(top - 1), step(top)];
  const slope = (rise(top) * (a / b) + rise(top - 1) * (b / a)) / (a + b);
  return value + (slope * slope) / (-4 * bend);
}
