/**
 * Random histories, quartic in every step, against brute force: the answers from turning points and crossings are those of a
 * grid of 100 times a step, within two of them. Runs are left out in which an extreme comes so close to the limit, or a hold
 * so close to its duration, that the grid itself could not tell.
 *
 * To replay a failure put the seed and the path that fast-check prints into `replay`; a seed that once failed stays as a test.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Answer, Requirement } from '../../solver/model';
import { equalPoints, madeUpStep, playField, type FieldFunction } from '../support/madeUpRun';
import { plan, requirement } from '../support/plan';

const SEED = 41;
const replay = {};

const STAGE = 100;
const STEPS = 4;
const FINE = 100;
const STEP = STAGE / STEPS;
const FINE_STEP = STEP / FINE;
const POINTS = 3;

/** Temperatures at the quarters of every step of two stages, point by point: continuous, with leaps of up to 60 K a quarter. */
const histories = fc
  .array(fc.array(fc.integer({ min: -600, max: 600 }), { minLength: 8 * STEPS + 1, maxLength: 8 * STEPS + 1 }), {
    minLength: 2 * POINTS,
    maxLength: 2 * POINTS,
  })
  .map((rows) => rows.map((moves) => moves.reduce<number[]>((row, move) => [...row, (row.at(-1) ?? 300) + move / 10], [])));

const fieldOf =
  (rows: number[][]): FieldFunction =>
  (_, time, point) =>
    rows[point][Math.round((time / STEP) * 4)];

const subjects = fc.constantFrom<Requirement['of']>(
  { probe: 'p' },
  { point: 'coldest' },
  { point: 'hottest' },
  { difference: 'part' },
  { difference: 'material' },
);
const sense = fc.constantFrom<'atLeast' | 'atMost'>('atLeast', 'atMost');
/** Evenly between two numbers (doubles of fast-check crowd around 0). */
const evenly = (min: number, max: number) =>
  fc.integer({ min: 0, max: 4999 }).map((i) => min + ((i + 0.37) / 5000) * (max - min));
/** Limits as a part of the range that the quantity really has, so that they matter. */
const share = evenly(-0.1, 1.1);
const rules = fc.oneof(
  fc.record({ kind: fc.constant('reaches' as const), sense, share }),
  fc.record({ kind: fc.constant('staysBelow' as const), share }),
  fc.record({ kind: fc.constant('staysAbove' as const), share }),
  fc.record({ kind: fc.constant('heldFor' as const), sense, share, duration: evenly(1, 150) }),
);
const windows = fc.oneof(
  fc.constant<Requirement['counts']>({ kind: 'cycle' }),
  fc.constantFrom<Requirement['counts']>({ kind: 'stage', stage: 's1' }, { kind: 'stage', stage: 's2' }),
  fc.constantFrom<Requirement['counts']>({ kind: 'stageEnd', stage: 's1' }, { kind: 'stageEnd', stage: 's2' }),
  evenly(1, 250).map<Requirement['counts']>((time) => ({ kind: 'within', time })),
  evenly(1, 120).map<Requirement['counts']>((time) => ({ kind: 'within', time, from: 's2' })),
);

/** The quantity on the fine grid: nodes only, three a layer, so that nothing is refined between them. */
function onGrid(rows: number[][], of: Requirement['of']): { times: number[]; values: number[] } {
  const points = equalPoints([0.5, 0.5], POINTS);
  const profile = new Float64Array(2 * POINTS);
  const times: number[] = [];
  const values: number[] = [];
  for (let i = 0; i < 2 * STEPS; i++) {
    const step = madeUpStep(points, fieldOf(rows), i * STEP, (i + 1) * STEP, i < STEPS ? 0 : 1);
    for (let k = i === 0 ? 0 : 1; k <= FINE; k++) {
      step.at(k / FINE, profile);
      times.push(i * STEP + k * FINE_STEP);
      values.push(quantityOf([...profile], of));
    }
  }
  return { times, values };
}

function quantityOf(profile: number[], of: Requirement['of']): number {
  const spread = (part: number[]): number => Math.max(...part) - Math.min(...part);
  if ('probe' in of) return profile[0];
  if ('point' in of) return of.point === 'coldest' ? Math.min(...profile) : Math.max(...profile);
  if (of.difference === 'part') return spread(profile);
  return Math.max(spread(profile.slice(0, POINTS)), spread(profile.slice(POINTS)));
}

interface Brute {
  verdict: Answer['verdict'];
  time: number | null;
  value: number | null;
  /** The grid is too coarse to tell. */
  close: boolean;
}

/** The answer by looking at every time of the grid. */
function byBruteForce({ must, counts }: Requirement, times: number[], values: number[]): Brute {
  const upper = must.kind === 'staysBelow' || ('sense' in must && must.sense === 'atMost');
  const good = values.map((value) => (upper ? must.limit - value : value - must.limit));
  const move = (i: number): number =>
    Math.max(Math.abs(good[i] - (good[i - 1] ?? good[i])), Math.abs(good[i] - (good[i + 1] ?? good[i])));
  const isTurn = (i: number): boolean => (good[i] - (good[i - 1] ?? good[i])) * ((good[i + 1] ?? good[i]) - good[i]) <= 0;
  const isClose = (i: number): boolean => Math.abs(good[i]) < 2 * move(i);
  const close = good.some((_, i) => isTurn(i) && isClose(i));
  const stageEnd = counts.kind === 'stageEnd' ? (counts.stage === 's1' ? STAGE : 2 * STAGE) : null;
  const from = counts.kind === 'within' ? (counts.from === undefined ? 0 : STAGE) : 0;
  const window = windowOf(counts, from);
  const inside = indices(times, window.from, window.to);
  const atEdge = [window.from, window.to].some((edge) => isClose(Math.round(edge / FINE_STEP)));
  const doubt = close || atEdge;
  const extreme = (of: number[], sign: 1 | -1): number =>
    of.reduce((top, i) => (sign * (good[i] - good[top]) > 0 ? i : top), of[0]);

  if (must.kind === 'heldFor') {
    const holds = stretches(good, stageEnd === null ? inside : indices(times, 0, stageEnd), times);
    const longest = stageEnd === null ? Math.max(0, ...holds.map(([a, b]) => b - a)) : lengthUpTo(holds, stageEnd);
    const doubtful = doubt || holds.some(([a, b]) => Math.abs(b - a - must.duration) < 3 * FINE_STEP);
    const first = holds.find(([a, b]) => b - a >= must.duration);
    if (holds.length === 0) return { verdict: 'never-reached', time: null, value: 0, close: doubtful };
    if (stageEnd !== null) {
      return { verdict: longest >= must.duration ? 'met' : 'not-met', time: stageEnd, value: longest, close: doubtful };
    }
    if (first === undefined) return { verdict: 'not-met', time: null, value: longest, close: doubtful };
    return { verdict: 'met', time: first[0] + must.duration, value: longest, close: doubtful };
  }
  if (stageEnd !== null) {
    const i = Math.round(stageEnd / FINE_STEP);
    return { verdict: good[i] >= 0 ? 'met' : 'not-met', time: stageEnd, value: values[i], close: doubt };
  }
  if (must.kind !== 'reaches') {
    const worst = extreme(inside, -1);
    return { verdict: good[worst] >= 0 ? 'met' : 'not-met', time: null, value: values[worst], close: doubt };
  }
  const look = counts.kind === 'within' ? indices(times, from, 2 * STAGE) : inside;
  const reached = look.find((i) => good[i] >= 0);
  if (reached === undefined) return { verdict: 'never-reached', time: null, value: values[extreme(look, 1)], close: doubt };
  const late = counts.kind === 'within' && times[reached] > from + counts.time;
  const onTime = counts.kind !== 'within' || Math.abs(times[reached] - from - counts.time) > 3 * FINE_STEP;
  return {
    verdict: late ? 'not-met' : 'met',
    time: times[reached],
    value: values[extreme(inside, 1)],
    close: doubt || !onTime,
  };
}

function windowOf(counts: Requirement['counts'], from: number): { from: number; to: number } {
  if (counts.kind === 'stage' || counts.kind === 'stageEnd') {
    const end = counts.stage === 's1' ? STAGE : 2 * STAGE;
    return { from: counts.kind === 'stage' ? end - STAGE : end, to: end };
  }
  return { from, to: counts.kind === 'within' ? Math.min(2 * STAGE, from + counts.time) : 2 * STAGE };
}

const indices = (times: number[], from: number, to: number): number[] =>
  times.flatMap((time, i) => (time >= from - 1e-9 && time <= to + 1e-9 ? [i] : []));

function stretches(good: number[], inside: number[], times: number[]): [number, number][] {
  const found: [number, number][] = [];
  inside.forEach((i, k) => {
    if (good[i] < 0) return;
    const last = found.at(-1);
    if (k > 0 && good[inside[k - 1]] >= 0 && last !== undefined) last[1] = times[i];
    else found.push([times[i], times[i]]);
  });
  return found;
}

const lengthUpTo = (holds: [number, number][], end: number): number => {
  const last = holds.at(-1);
  return last !== undefined && Math.abs(last[1] - end) < 1e-6 ? last[1] - last[0] : 0;
};

describe('answers from turning points and crossings', () => {
  it(`are those of brute force on a fine grid, within two of its times (seed ${SEED})`, () => {
    let compared = 0;
    const verdicts = new Set<string>();
    fc.assert(
      fc.property(histories, subjects, rules, windows, (rows, of, { share: part, ...rule }, counts) => {
        const { times, values } = onGrid(rows, of);
        const [low, high] = [Math.min(...values), Math.max(...values)];
        const limit = Math.max(0, low + part * (high - low));
        const asked = requirement({ ...rule, limit } as Requirement['must'], counts, of);
        const brute = byBruteForce(asked, times, values);
        if (brute.close) return;
        const project = plan({
          layers: [0.5, 0.5],
          materials: ['a', 'b'],
          stages: [STAGE, STAGE],
          requirements: [asked],
          probes: [{ id: 'p', name: 'Probe', at: { face: 'start' } }],
        });
        const play = { steps: STEPS, points: equalPoints([0.5, 0.5], POINTS) };
        const [answer] = playField(project, fieldOf(rows), play).answers;
        expect(answer.verdict).toBe(brute.verdict);
        if (brute.time !== null) expect(Math.abs((answer.time_s ?? NaN) - brute.time)).toBeLessThan(2 * FINE_STEP);
        const inGrid = asked.must.kind === 'heldFor' ? 2 * FINE_STEP : 0.02 * (high - low);
        if (brute.value !== null) expect(Math.abs((answer.value ?? NaN) - brute.value)).toBeLessThan(inGrid);
        compared++;
        verdicts.add(`${asked.must.kind} ${answer.verdict}`);
      }),
      { seed: SEED, numRuns: 400, ...replay },
    );
    // Most runs were really compared, and every verdict of every rule came up.
    expect(compared).toBeGreaterThan(200);
    expect([...verdicts].sort()).toEqual([
      'heldFor met',
      'heldFor never-reached',
      'heldFor not-met',
      'reaches met',
      'reaches never-reached',
      'reaches not-met',
      'staysAbove met',
      'staysAbove not-met',
      'staysBelow met',
      'staysBelow not-met',
    ]);
  });

  it(`have crossings at which the probe really has the limit, to 1e-9 of a step (seed ${SEED})`, () => {
    fc.assert(
      fc.property(histories, share, (rows, part) => {
        const [low, high] = [Math.min(...rows[0]), Math.max(...rows[0])];
        const limit = Math.max(0, low + part * (high - low));
        const asked = requirement({ kind: 'reaches', sense: 'atLeast', limit });
        const project = plan({ layers: [0.5, 0.5], stages: [STAGE, STAGE], requirements: [asked] });
        const play = { steps: STEPS, points: equalPoints([0.5, 0.5], POINTS) };
        const [answer] = playField(project, fieldOf(rows), play).answers;
        if (answer.time_s === null || answer.time_s === 0) return;
        const index = Math.min(2 * STEPS - 1, Math.floor(answer.time_s / STEP));
        const step = madeUpStep(play.points, fieldOf(rows), index * STEP, (index + 1) * STEP);
        const fraction = answer.time_s / STEP - index;
        const slope = (step.combinationAt([0], [1], fraction + 1e-6) - step.combinationAt([0], [1], fraction - 1e-6)) / 2e-6;
        const missing = Math.abs(step.combinationAt([0], [1], fraction) - limit);
        expect(missing).toBeLessThan(1e-9 * Math.abs(slope) + 2e-9);
      }),
      { seed: SEED, numRuns: 300, ...replay },
    );
  });

  it(`name the hottest point and the largest differences that the grid finds (seed ${SEED})`, () => {
    fc.assert(
      fc.property(histories, (rows) => {
        const project = plan({ layers: [0.5, 0.5], materials: ['a', 'b'], stages: [STAGE, STAGE] });
        const { first } = playField(project, fieldOf(rows), { steps: STEPS, points: equalPoints([0.5, 0.5], POINTS) });
        const found: [Requirement['of'], number, number][] = [
          [{ point: 'hottest' }, first.hottest?.temperature_C ?? NaN, first.hottest?.time_s ?? NaN],
          [{ difference: 'part' }, first.largestDifference?.value_K ?? NaN, first.largestDifference?.time_s ?? NaN],
          [
            { difference: 'material' },
            first.largestDifferenceInMaterial?.value_K ?? NaN,
            first.largestDifferenceInMaterial?.time_s ?? NaN,
          ],
        ];
        for (const [of, value, time] of found) {
          const { values } = onGrid(rows, of);
          const top = values.indexOf(Math.max(...values));
          const beside =
            Math.abs(values[top] - (values[top - 1] ?? values[top])) + Math.abs(values[top] - (values[top + 1] ?? values[top]));
          expect(value).toBeGreaterThan(values[top] - 1e-3);
          expect(value).toBeLessThan(values[top] + beside + 1e-9);
          expect(values[Math.round(time / FINE_STEP)]).toBeGreaterThan(values[top] - beside - 1e-9);
        }
      }),
      { seed: SEED, numRuns: 60, ...replay },
    );
  });

  it(`name the slowest place and its time as looking back over the grid does (seed ${SEED})`, () => {
    fc.assert(
      fc.property(histories, (rows) => {
        const project = plan({ layers: [0.5, 0.5], stages: [STAGE, STAGE] });
        const points = equalPoints([0.5, 0.5], POINTS);
        const { stages } = playField(project, fieldOf(rows), { steps: STEPS, points });
        const history = rows.map((_, point) => onGrid([rows[point], ...rows.slice(1)], { probe: 'p' }).values);
        stages.forEach(({ slowest }, stage) => {
          const ofStage = history.map((values) => values.slice(stage * STEPS * FINE, (stage + 1) * STEPS * FINE + 1));
          const change = ofStage.map((values) => Math.abs(values[values.length - 1] - values[0]));
          const counted = change.map((by) => by >= Math.max(1, 0.05 * Math.max(...change)));
          const times = ofStage.map((values, point) => {
            const open = values.findLastIndex((value) => Math.abs(value - values[values.length - 1]) > 0.05 * change[point]);
            return counted[point] ? stage * STAGE + open * FINE_STEP : -Infinity;
          });
          const latest = Math.max(...times);
          if (latest === -Infinity) return expect(slowest).toBeNull();
          // No place is outside later on the grid, and this one is 5 % of its change from its end at that very time.
          if (slowest === null) throw new Error('no slowest place');
          expect(slowest.time_s).toBeGreaterThan(latest - 1e-6);
          const point = points.position.indexOf(slowest.position_m, slowest.layer === 'l1' ? 0 : POINTS);
          const index = Math.min((stage + 1) * STEPS - 1, Math.floor(slowest.time_s / STEP));
          const step = madeUpStep(points, fieldOf(rows), index * STEP, (index + 1) * STEP);
          const end = ofStage[point][ofStage[point].length - 1];
          const open = Math.abs(step.combinationAt([point], [1], slowest.time_s / STEP - index) - end);
          expect(Math.abs(open - 0.05 * change[point])).toBeLessThan(1e-6);
        });
      }),
      { seed: SEED, numRuns: 100, ...replay },
    );
  });
});
