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
import { volumeFrom } from '../grid';
import { curveAt } from '../materials';
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
const PIECES = 512;

interface Piece {
  from: number;
  to: number;
  /** Profiles at the quarters of the piece, °C. */
  rows: Float64Array[];
  steps: number;
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
  /** Steps that a piece is joined of. */
  private stepsAPiece = 1;
  private readonly pool = new Pool();

  constructor(project: Pick<Project, 'part' | 'materials'>, points: FieldPoints, cycle: LaidCycle) {
    this.project = project;
    this.points = points;
    this.cycle = cycle;
  }

  observe({ step, rows }: Quarters): void {
    if (step.stage !== this.stage) {
      this.found[this.stage] = this.evaluate();
      this.stage = step.stage;
      this.pool.take(this.pieces);
      this.pieces = [];
      this.stepsAPiece = 1;
    }
    const { pieces } = this;
    pieces.push({ from: step.from, to: step.to, rows: rows.map((row) => this.pool.copyOf(row)), steps: 1 });
    while (pieces.length > 1 && pieces[pieces.length - 1].steps < this.stepsAPiece) {
      const [before, last] = [pieces[pieces.length - 2], pieces[pieces.length - 1]];
      if (before.steps !== last.steps) break;
      pieces.length -= 2;
      pieces.push(this.joined(before, last));
    }
    if (pieces.length < PIECES) return;
    this.pieces = Array.from({ length: PIECES / 2 }, (_, i) => this.joined(pieces[2 * i], pieces[2 * i + 1]));
    this.stepsAPiece *= 2;
  }

  /** One piece in the place of two neighbours, whose rows are free again. */
  private joined(a: Piece, b: Piece): Piece {
    const [from, to] = [a.from, b.to];
    const inner = [0.25, 0.5, 0.75].map((part) => {
      const time = from + part * (to - from);
      const piece = time <= a.to ? a : b;
      return rowAt(piece, (time - piece.from) / (piece.to - piece.from), this.pool.row(a.rows[0].length));
    });
    for (let i = 0; i < 4; i++) this.pool.give(a.rows[i + 1], b.rows[i]);
    return { from, to, rows: [a.rows[0], ...inner, b.rows[4]], steps: a.steps + b.steps };
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
    return this.pieces.length > 0 ? [...this.found, this.evaluate()] : this.found;
  }

  private evaluate(): StageFindings {
    const { pieces } = this;
    if (pieces.length === 0) return { slowest: null, heats: false };
    const start = pieces[0].rows[0];
    const end = pieces[pieces.length - 1].rows[4];
    const change = start.map((from, i) => end[i] - from);
    const largest = change.reduce((most, by) => Math.max(most, Math.abs(by)), 0);
    const least = Math.max(SMALLEST_CHANGE_K, SMALLEST_SHARE * largest);
    const closed = change.map((by, i) => (Math.abs(by) < least ? NaN : lastOpen(pieces, i, end[i], OPEN * Math.abs(by))));
    return { slowest: this.latest(closed), heats: this.meanOf(change, start) > HEATING_SHARE * largest };
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

  /** Mean over the volume, weighted with the heat capacity that the layers have at the start of the stage. */
  private meanOf(change: Float64Array, start: Float64Array): number {
    const { position, layerStart } = this.points;
    const { part, materials } = this.project;
    let [sum, weights] = [0, 0];
    part.layers.forEach((layer, index) => {
      const material = materials.find(({ id }) => id === layer.material);
      for (let i = layerStart[index] + 1; i < layerStart[index + 1]; i++) {
        const at = (start[i] + start[i - 1]) / 2;
        const capacity = material === undefined ? 1 : curveAt(material.density, at) * curveAt(material.heatCapacity, at);
        const weight = capacity * volumeFrom(part, position[i - 1], position[i] - position[i - 1]);
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

/** Fractions of a piece closer to a quarter than this are that quarter. */
const SAME_QUARTER = 1e-9;

/** A piece's profile at u, by Lagrange's quartic through its quarters. */
function rowAt({ rows }: Piece, u: number, out: Float64Array): Float64Array {
  const quarter = Math.round(4 * u);
  if (Math.abs(4 * u - quarter) < SAME_QUARTER) {
    out.set(rows[quarter]);
    return out;
  }
  const [w0, w1, w2, w3, w4] = quarterWeights(u);
  const [r0, r1, r2, r3, r4] = rows;
  for (let i = 0; i < out.length; i++) out[i] = w0 * r0[i] + w1 * r1[i] + w2 * r2[i] + w3 * r3[i] + w4 * r4[i];
  return out;
}

function quarterWeights(u: number): number[] {
  const nodes = [0, 0.25, 0.5, 0.75, 1];
  return nodes.map((node) => nodes.reduce((w, other) => (other === node ? w : (w * (u - other)) / (node - other)), 1));
}

/** Rows used again: a run of a million steps would otherwise make five million. */
class Pool {
  private readonly free: Float64Array[] = [];

  row(length: number): Float64Array {
    return this.free.pop() ?? new Float64Array(length);
  }

  copyOf(row: Float64Array): Float64Array {
    const copy = this.row(row.length);
    copy.set(row);
    return copy;
  }

  give(...rows: Float64Array[]): void {
    this.free.push(...rows);
  }

  take(pieces: readonly Piece[]): void {
    for (const { rows } of pieces) this.give(...rows);
  }
}
