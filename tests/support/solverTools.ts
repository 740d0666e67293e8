/** Tools for tests of the solver core: bodies marched by any scheme, and dense algebra to compare with. */
import type { HeatSystem } from '../../solver/heat';
import { makeScheme, RunLoop, startState, type CycleInterval, type HeatState, type SchemeSettings } from '../../solver/stepping';

/** One interval from 0 to `end` in the first stage; it begins with a jump. */
export const interval = (end: number, from = 0): CycleInterval => ({ stage: 0, from, to: end, jumped: true });

export interface Marched {
  state: HeatState;
  loop: RunLoop;
}

/** Marches a body over intervals with a scheme, from its own start or from given unknowns. Throws where a step fails. */
export function march(
  system: HeatSystem,
  settings: SchemeSettings,
  intervals: readonly CycleInterval[],
  from?: Float64Array,
  onStep: (time: number, state: HeatState) => void = () => undefined,
): Marched {
  const state = startState(system);
  if (from !== undefined) {
    state.unknowns.set(from);
    system.evaluate(state.unknowns, 0);
    state.stored.set(system.storage);
  }
  const scheme = makeScheme(settings, system, state, intervals[intervals.length - 1].to);
  const observer = { interval: () => undefined, step: (_from: number, to: number) => onStep(to, state) };
  const loop = new RunLoop(system, state, scheme, intervals, observer, 10_000_000);
  for (;;) {
    const ending = loop.advance();
    if (ending === null) continue;
    if (ending.reason !== 'finished') throw new Error(`the march ended with ${ending.reason} at ${loop.time} s`);
    return { state, loop };
  }
}

/** Takes `steps` equal steps of a scheme over one interval; the automatic scheme is given its steps as well. */
export function equalSteps(
  system: HeatSystem,
  settings: (step: number) => SchemeSettings,
  end: number,
  steps: number,
  from?: Float64Array,
): HeatState {
  const state = startState(system);
  if (from !== undefined) state.unknowns.set(from);
  system.enter({ stage: 0, from: 0, to: end }, state.unknowns, state.stored, state.through);
  system.evaluate(state.unknowns, 0);
  state.stored.set(system.storage);
  const step = end / steps;
  const scheme = makeScheme(settings(step), system, state, end);
  scheme.begin(0, true);
  for (let i = 0; i < steps; i++) {
    const attempt = scheme.attempt(i * step, step);
    if (attempt.kind !== 'accepted') throw new Error(`step ${i} was ${attempt.kind}`);
  }
  return state;
}

/** A dense matrix, row by row, from what multiplies by it. */
export function denseOf(size: number, times: (x: Float64Array, out: Float64Array) => void): number[][] {
  const columns = Array.from({ length: size }, (_, j) => {
    const x = new Float64Array(size);
    const out = new Float64Array(size);
    x[j] = 1;
    times(x, out);
    return out;
  });
  return Array.from({ length: size }, (_, i) => columns.map((column) => column[i]));
}

/** Solves by Gauss's elimination with pivoting. */
export function denseSolve(matrix: number[][], rightHandSide: ArrayLike<number>): number[] {
  const size = matrix.length;
  const a = matrix.map((row, i) => [...row, rightHandSide[i]]);
  for (let i = 0; i < size; i++) {
    let pivot = i;
    for (let r = i + 1; r < size; r++) if (Math.abs(a[r][i]) > Math.abs(a[pivot][i])) pivot = r;
    [a[i], a[pivot]] = [a[pivot], a[i]];
    for (let r = i + 1; r < size; r++) {
      const m = a[r][i] / a[i][i];
      for (let c = i; c <= size; c++) a[r][c] -= m * a[i][c];
    }
  }
  const x = new Array<number>(size).fill(0);
  for (let i = size - 1; i >= 0; i--) {
    let sum = a[i][size];
    for (let c = i + 1; c < size; c++) sum -= a[i][c] * x[c];
    x[i] = sum / a[i][i];
  }
  return x;
}

/** All eigenvalues of a symmetric matrix by Jacobi's rotations, ascending. */
export function symmetricEigenvalues(matrix: number[][]): number[] {
  const a = matrix.map((row) => [...row]);
  const size = a.length;
  for (let sweep = 0; sweep < 60; sweep++) {
    let off = 0;
    for (let p = 0; p < size; p++) {
      for (let q = p + 1; q < size; q++) {
        off += a[p][q] ** 2;
        if (a[p][q] !== 0) rotate(a, p, q);
      }
    }
    if (off < 1e-30 * a.reduce((sum, row, i) => sum + row[i] ** 2, 0)) break;
  }
  return a.map((row, i) => row[i]).sort((x, y) => x - y);
}

function rotate(a: number[][], p: number, q: number): void {
  const theta = (a[q][q] - a[p][p]) / (2 * a[p][q]);
  const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
  const c = 1 / Math.sqrt(t * t + 1);
  const s = t * c;
  for (let k = 0; k < a.length; k++) {
    const [kp, kq] = [a[k][p], a[k][q]];
    a[k][p] = c * kp - s * kq;
    a[k][q] = s * kp + c * kq;
  }
  for (let k = 0; k < a.length; k++) {
    const [pk, qk] = [a[p][k], a[q][k]];
    a[p][k] = c * pk - s * qk;
    a[q][k] = s * pk + c * qk;
  }
}

/** Numbers from 0 to 1 that are the same every time (mulberry32). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}
