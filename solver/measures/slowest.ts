/**
 * The slowest place of every stage: where |T − T(end)| last exceeds 5 % of |T(end) − T(start)|.
 *
 * T(end) is known only when the stage is over, so the field over the stage is kept as quartic pieces, five profiles each: a
 * step is a piece, exact to the dense output. Of more than PIECES steps neighbours are joined two by two, again and again; a
 * joined piece is the quartic through its own quarters. An exponential course of a stage, in 40 000 steps, then has its
 * crossing within 1e-6 of the stage's length.
 *
 * Places that change less than 1 K, or less than 5 % of the largest change, are left out. Between points the latest time is
 * refined as extremes are (see peak.ts). A stage heats where the mean temperature of the part, weighted with heat capacity,
 * rises by more than 1 % of the largest change: an insulated rest, in which heat only evens out, does not.
 */
import type { LaidCycle, Project, Slowest } from '../model';
import type { FieldPoints } from '../stepping';
import { peakBeside } from './peak';
import type { Quarters } from './quarters';
import { quarticThrough, rootBetween, turnsOf, valueOf } from './quartic';

/** Part of its own change that a place may still be away from its end. */
const OPEN = 0.05;
const SMALLEST_CHANGE_K = 1;
const SMALLEST_SHARE = 0.05;
const HEATING_SHARE = 0.01;
/** Times closer than this part of the stage are one. */
const SAME_TIME = 1e-9;
/** Pieces kept of a stage. */
export const PIECES = 512;

interface Piece {
  from: number;
  to: number;
  /** Profiles at the quarters of the piece, °C. */
  rows: Float64Array[];
}

interface StageFindings {
  slowest: Slowest | null;
  heats: boolean;
}

export class SlowestFinder {
  private readonly project: Pick<Project, 'part' | 'materials'>;
  private readonly points: FieldPoints;
  private readonly cycle: LaidCycle;
  private readonly found: StageFindings[] = [];
  private stage = 0;
  private pieces: Piece[] = [];
  /** Steps that the next piece is joined of, and those waiting to be joined. */
  private stepsAPiece = 1;
  private waiting: Piece[] = [];

  constructor(project: Pick<Project, 'part' | 'materials'>, points: FieldPoints, cycle: LaidCycle) {
    this.project = project;
    this.points = points;
    this.cycle = cycle;
  }

  observe({ step, rows }: Quarters): void {
    if (step.stage !== this.stage) {
      this.found[this.stage] = this.evaluate();
      this.stage = step.stage;
      this.pieces = [];
      this.waiting = [];
      this.stepsAPiece = 1;
    }
    this.waiting.push({ from: step.from, to: step.to, rows: rows.map((row) => row.slice()) });
    if (this.waiting.length < this.stepsAPiece) return;
    this.pieces.push(join(this.waiting));
    this.waiting = [];
    if (this.pieces.length < PIECES) return;
    this.pieces = Array.from({ length: PIECES / 2 }, (_, i) => join(this.pieces.slice(2 * i, 2 * i + 2)));
    this.stepsAPiece *= 2;
  }

  /** One entry a stage; the stage in hand is taken up to now, those not begun are null. */
  stages(): (Slowest | null)[] {
    const all = this.findings();
    return this.cycle.stages.map((_, index) => all[index]?.slowest ?? null);
  }

  /** Of the last stage that heats, or, if none heats, of the last one that changes. */
  whole(): Slowest | null {
    const changing = this.findings().filter(({ slowest }) => slowest !== null);
    return (changing.findLast(({ heats }) => heats) ?? changing.at(-1))?.slowest ?? null;
  }

  private findings(): StageFindings[] {
    const begun = this.pieces.length + this.waiting.length > 0;
    return begun ? [...this.found, this.evaluate()] : this.found;
  }

  private evaluate(): StageFindings {
    const pieces = this.waiting.length > 0 ? [...this.pieces, join(this.waiting)] : this.pieces;
    if (pieces.length === 0) return { slowest: null, heats: false };
    const start = pieces[0].rows[0];
    const end = pieces[pieces.length - 1].rows[4];
    const change = start.map((from, i) => end[i] - from);
    const largest = change.reduce((most, by) => Math.max(most, Math.abs(by)), 0);
    const least = Math.max(SMALLEST_CHANGE_K, SMALLEST_SHARE * largest);
    const closed = change.map((by, i) => (Math.abs(by) < least ? NaN : lastOpen(pieces, i, end[i], OPEN * Math.abs(by))));
    return { slowest: this.latest(closed), heats: this.meanOf(change) > HEATING_SHARE * largest };
  }

  /** The place of the latest time, the one nearest to the start face where several share it; NaN marks a point left out. */
  private latest(closed: Float64Array): Slowest | null {
    const { position, layerStart } = this.points;
    const stage = this.cycle.stages[this.stage];
    const sameTime = SAME_TIME * (stage.end - stage.start);
    let top = -1;
    closed.forEach((time, i) => {
      if (top < 0 ? !Number.isNaN(time) : time > closed[top] + sameTime) top = i;
    });
    if (top < 0) return null;
    const layer = layerStart.findLastIndex((first) => first <= top);
    let [first, last] = [top, top];
    while (first > layerStart[layer] && !Number.isNaN(closed[first - 1])) first--;
    while (last < layerStart[layer + 1] - 1 && !Number.isNaN(closed[last + 1])) last++;
    const peak = { position: 0, value: 0 };
    peakBeside(position, closed, first, last, top, 1, peak);
    return { position_m: peak.position, layer: this.project.part.layers[layer].id, stage: stage.id, time_s: peak.value };
  }

  /** Mean over the depth, weighted with the heat capacity of the layers. */
  private meanOf(change: Float64Array): number {
    const { position, layerStart } = this.points;
    let [sum, weights] = [0, 0];
    this.project.part.layers.forEach((layer, index) => {
      const material = this.project.materials.find(({ id }) => id === layer.material);
      const capacity = material === undefined ? 1 : material.density * material.heatCapacity;
      for (let i = layerStart[index] + 1; i < layerStart[index + 1]; i++) {
        const weight = capacity * (position[i] - position[i - 1]);
        sum += (weight * (change[i] + change[i - 1])) / 2;
        weights += weight;
      }
    });
    return sum / weights;
  }
}

/** Time at which a point is last further than `open` from its end, s: from the last piece back. */
function lastOpen(pieces: readonly Piece[], point: number, end: number, open: number): number {
  for (let p = pieces.length - 1; p >= 0; p--) {
    const { from, to, rows } = pieces[p];
    const shape = quarticThrough(
      rows[0][point] - end,
      rows[1][point] - end,
      rows[2][point] - end,
      rows[3][point] - end,
      rows[4][point] - end,
    );
    const edges = [0, ...turnsOf(shape), 1];
    for (let e = edges.length - 1; e > 0; e--) {
      const before = valueOf(shape, edges[e - 1]);
      if (Math.abs(before) <= open) continue;
      const level = Math.sign(before) * open;
      const shifted = [shape[0] - level, ...shape.slice(1)];
      const after = valueOf(shifted, edges[e]);
      // A jump between two pieces: still open at the end of this one.
      if (after * Math.sign(before) > 0) return from + edges[e] * (to - from);
      return from + rootBetween(shifted, edges[e - 1], edges[e]) * (to - from);
    }
  }
  return pieces[0].from;
}

/** One piece over the time of several: its quarters read off their quartics. */
function join(pieces: readonly Piece[]): Piece {
  if (pieces.length === 1) return pieces[0];
  const [from, to] = [pieces[0].from, pieces[pieces.length - 1].to];
  const inner = [0.25, 0.5, 0.75].map((part) => {
    const time = from + part * (to - from);
    const piece = pieces.find((candidate) => time <= candidate.to) ?? pieces[pieces.length - 1];
    return rowAt(piece, (time - piece.from) / (piece.to - piece.from));
  });
  return { from, to, rows: [pieces[0].rows[0], ...inner, pieces[pieces.length - 1].rows[4]] };
}

/** A piece's profile at u: the weights of Lagrange's quartic through its quarters. */
function rowAt({ rows }: Piece, u: number): Float64Array {
  const nodes = [0, 0.25, 0.5, 0.75, 1];
  const weights = nodes.map((node) => nodes.reduce((w, other) => (other === node ? w : (w * (u - other)) / (node - other)), 1));
  return rows[0].map((_, i) => weights.reduce((sum, weight, k) => sum + weight * rows[k][i], 0));
}
