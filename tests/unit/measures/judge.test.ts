import { describe, expect, it } from 'vitest';
import type { Answer, Requirement, Span } from '../../../solver/model';
import { playField, type FieldFunction, type Play } from '../../support/madeUpRun';
import { plan, requirement } from '../../support/plan';

interface Case {
  stages?: number[];
  play?: Play;
  layers?: number[];
  materials?: string[];
}
const answerTo = (asked: Requirement, field: FieldFunction, { stages = [100, 100], play, ...wall }: Case = {}): Answer =>
  playField(plan({ ...wall, stages, requirements: [asked] }), field, play).answers[0];
const of = (kind: Span['kind'], { spans }: Answer): [number, number][] =>
  spans.filter((span) => span.kind === kind).map(({ from_s, to_s }) => [Number(from_s.toFixed(6)), Number(to_s.toFixed(6))]);

const reaches = (limit: number, sense: 'atLeast' | 'atMost' = 'atLeast') => ({ kind: 'reaches', sense, limit }) as const;
const held = (limit: number, duration: number, sense: 'atLeast' | 'atMost' = 'atLeast') =>
  ({ kind: 'heldFor', sense, limit, duration }) as const;
const below = (limit: number) => ({ kind: 'staysBelow', limit }) as const;
const above = (limit: number) => ({ kind: 'staysAbove', limit }) as const;
const within = (time: number, from?: string) => ({ kind: 'within', time, from }) as const;
const stage = (id: string) => ({ kind: 'stage', stage: id }) as const;
const atEnd = (id: string) => ({ kind: 'stageEnd', stage: id }) as const;

/** Heats by 1 K/s from 20 °C, steadily. */
const ramp: FieldFunction = (_, t) => 20 + t;
/** A hump: 20 °C, up to 120 °C at 100 s, back to 20 °C at 200 s. */
const hump: FieldFunction = (_, t) => 120 - (t - 100) ** 2 / 100;

describe('reaches', () => {
  it('anywhere: met at the first crossing, inside a step, with the best value as margin', () => {
    const answer = answerTo(requirement(reaches(153.21)), ramp);
    expect(answer).toMatchObject({ verdict: 'met', met: true, stage: 's2', unit: '°C', margin_unit: 'K', limit: 153.21 });
    expect(answer.time_s).toBeCloseTo(133.21, 9);
    expect(answer.stage_time_s).toBeCloseTo(33.21, 9);
    expect(answer.value).toBeCloseTo(220, 10);
    expect(answer.margin).toBeCloseTo(66.79, 10);
    expect(of('fulfilled', answer)).toEqual([[133.21, 200]]);
    expect(of('counting', answer)).toEqual([[0, 200]]);
  });

  it('never: no time, the nearest value, a negative margin', () => {
    const answer = answerTo(requirement(reaches(125)), hump);
    expect(answer).toMatchObject({ verdict: 'never-reached', met: false, time_s: null, stage: null, stage_time_s: null });
    expect(answer.value).toBeCloseTo(120, 10);
    expect(answer.margin).toBeCloseTo(-5, 10);
  });

  it('a limit that the extreme inside a step just touches is reached, there', () => {
    const answer = answerTo(requirement(reaches(120)), hump, { play: { steps: [70, 130] } });
    expect(answer.verdict).toBe('met');
    expect(answer.time_s).toBeCloseTo(100, 3);
    expect(answer.margin).toBe(0);
  });

  it('downwards counts as well', () => {
    const answer = answerTo(requirement(reaches(50, 'atMost')), (_, t) => 200 - t);
    expect(answer.time_s).toBeCloseTo(150, 9);
    expect(answer.margin).toBeCloseTo(50, 9);
  });

  it('at the first instant, where it is so from the start, equality included', () => {
    expect(answerTo(requirement(reaches(20)), ramp)).toMatchObject({ verdict: 'met', time_s: 0, stage: 's1', stage_time_s: 0 });
    expect(answerTo(requirement(reaches(20)), () => 20)).toMatchObject({ verdict: 'met', time_s: 0, margin: 0 });
  });

  it('in one stage counts only there', () => {
    expect(answerTo(requirement(reaches(150), stage('s1')), ramp)).toMatchObject({ verdict: 'never-reached', value: 120 });
    const second = answerTo(requirement(reaches(50), stage('s2')), ramp);
    expect(second).toMatchObject({ verdict: 'met', time_s: 100, stage: 's2', stage_time_s: 0 });
  });

  it('within a time: the margin is the time left', () => {
    const answer = answerTo(requirement(reaches(50), within(45)), ramp);
    expect(answer).toMatchObject({ verdict: 'met', margin_unit: 's', unit: '°C' });
    expect(answer.time_s).toBeCloseTo(30, 9);
    expect(answer.margin).toBeCloseTo(15, 9);
    expect(answer.value).toBeCloseTo(65, 9);
  });

  it('within a time, late: not met, with the time and what is missing in seconds', () => {
    const answer = answerTo(requirement(reaches(150), within(20, 's2')), ramp);
    expect(answer).toMatchObject({ verdict: 'not-met', met: false, stage: 's2' });
    expect(answer.time_s).toBeCloseTo(130, 9);
    expect(answer.margin).toBeCloseTo(-10, 9);
    expect(answer.value).toBeCloseTo(140, 9);
    expect(of('holding', answer)).toEqual([[130, 200]]);
  });

  it('within a time, exactly at its end: met with no margin', () => {
    const answer = answerTo(requirement(reaches(120), within(100)), ramp);
    expect(answer.verdict).toBe('met');
    expect(answer.margin).toBeCloseTo(0, 9);
    expect(answer.margin).toBeGreaterThanOrEqual(0);
  });

  it('within a time, never: no margin, and the nearest it came in the rest of the cycle', () => {
    const answer = answerTo(requirement(reaches(300), within(20)), ramp);
    expect(answer).toMatchObject({ verdict: 'never-reached', margin: null, time_s: null, margin_unit: 's' });
    expect(answer.value).toBeCloseTo(220, 9);
  });

  it('within a time longer than the cycle keeps the whole time allowed', () => {
    expect(answerTo(requirement(reaches(50), within(1000)), ramp).margin).toBeCloseTo(970, 9);
    expect(answerTo(requirement(reaches(500), within(1000)), ramp).verdict).toBe('never-reached');
  });

  it("at a stage's end is judged by the value there", () => {
    expect(answerTo(requirement(reaches(110), atEnd('s1')), ramp)).toMatchObject({
      verdict: 'met',
      time_s: 100,
      stage: 's1',
      stage_time_s: 100,
      value: 120,
      margin: 10,
    });
    expect(answerTo(requirement(reaches(110), atEnd('s2')), hump)).toMatchObject({
      verdict: 'not-met',
      met: false,
      time_s: 200,
      margin: -90,
    });
  });
});

describe('stays below and above', () => {
  it('has its margin at the worst point, met or not', () => {
    const good = answerTo(requirement(below(130)), hump, { play: { steps: [70, 130] } });
    expect(good).toMatchObject({ verdict: 'met', stage: 's1', margin_unit: 'K' });
    expect(good.time_s).toBeCloseTo(100, 6);
    expect(good.margin).toBeCloseTo(10, 9);
    expect(of('fulfilled', good)).toEqual([[0, 200]]);
    const bad = answerTo(requirement(below(95)), hump);
    expect(bad).toMatchObject({ verdict: 'not-met', met: false });
    expect(bad.margin).toBeCloseTo(-25, 9);
    expect(of('violated', bad)).toEqual([[50, 150]]);
    expect(of('fulfilled', bad)).toEqual([
      [0, 50],
      [150, 200],
    ]);
  });

  it('is broken by an extreme inside one long step', () => {
    const answer = answerTo(requirement(below(119.99)), hump, { play: { steps: [60, 140] } });
    expect(answer.verdict).toBe('not-met');
    expect(answer.margin).toBeCloseTo(-0.01, 9);
  });

  it('is not broken by a value that equals the limit', () => {
    expect(answerTo(requirement(below(120)), hump)).toMatchObject({ verdict: 'met', margin: 0 });
    expect(answerTo(requirement(above(20)), ramp)).toMatchObject({ verdict: 'met', margin: 0, time_s: 0 });
  });

  it('counts in its window only, up to both its ends', () => {
    expect(answerTo(requirement(above(120), stage('s2')), ramp)).toMatchObject({ verdict: 'met', margin: 0 });
    expect(answerTo(requirement(below(119), stage('s1')), ramp)).toMatchObject({ verdict: 'not-met', time_s: 100, stage: 's1' });
    const early = answerTo(requirement(below(60), within(40)), ramp);
    expect(early.verdict).toBe('met');
    expect(early.time_s).toBeCloseTo(40, 9);
    expect(early.margin).toBeCloseTo(0, 9);
    expect(answerTo(requirement(above(100), atEnd('s2')), hump)).toMatchObject({ verdict: 'not-met', time_s: 200, margin: -80 });
  });
});

describe('held for', () => {
  it('is met at the moment it has been held long enough, and tells the longest hold', () => {
    const answer = answerTo(requirement(held(95, 60)), hump);
    expect(answer).toMatchObject({ verdict: 'met', unit: 's', margin_unit: 's', limit: 60, stage: 's2' });
    expect(answer.time_s).toBeCloseTo(110, 7);
    expect(answer.value).toBeCloseTo(100, 7);
    expect(answer.margin).toBeCloseTo(40, 7);
    expect(of('holding', answer)).toEqual([[50, 110]]);
    expect(of('fulfilled', answer)).toEqual([[110, 150]]);
  });

  it('is not met when broken before it is long enough: parts of a hold are not added up', () => {
    const twoHumps: FieldFunction = (_, t) => 100 + 20 * Math.sin((t * Math.PI) / 50);
    const answer = answerTo(requirement(held(100, 51)), twoHumps, { play: { steps: 100 } });
    expect(answer).toMatchObject({ verdict: 'not-met', met: false, time_s: null });
    expect(answer.value).toBeCloseTo(50, 4);
    expect(answer.margin).toBeCloseTo(-1, 4);
  });

  it('is never reached where the limit is not: held for 0 s', () => {
    expect(answerTo(requirement(held(121, 5)), hump)).toMatchObject({
      verdict: 'never-reached',
      value: 0,
      margin: -5,
      time_s: null,
    });
  });

  it('runs on over a stage edge, but counts only inside its window', () => {
    expect(answerTo(requirement(held(95, 100)), hump).verdict).toBe('met');
    const inStage = answerTo(requirement(held(95, 60), stage('s2')), hump);
    expect(inStage.verdict).toBe('not-met');
    expect(inStage.value).toBeCloseTo(50, 7);
  });

  it('as long as its stage is met when the condition holds all through it', () => {
    const answer = answerTo(requirement(held(20, 33.3), stage('s2')), ramp, { stages: [0.1, 33.3, 5] });
    expect(answer).toMatchObject({ verdict: 'met', stage: 's2' });
    expect(answer.margin).toBe(0);
  });

  it('within a time must be completed inside', () => {
    expect(answerTo(requirement(held(50, 40), within(70)), ramp)).toMatchObject({ verdict: 'met' });
    const late = answerTo(requirement(held(50, 41), within(70)), ramp);
    expect(late.verdict).toBe('not-met');
    expect(late.margin).toBeCloseTo(-1, 9);
  });

  it("at a stage's end is the unbroken time up to it, from before the stage too", () => {
    const answer = answerTo(requirement(held(70, 120), atEnd('s2')), ramp);
    expect(answer).toMatchObject({ verdict: 'met', time_s: 200, stage: 's2', stage_time_s: 100 });
    expect(answer.value).toBeCloseTo(150, 9);
    const over = answerTo(requirement(held(95, 10), atEnd('s2')), hump);
    expect(over).toMatchObject({ verdict: 'not-met', value: 0, margin: -10 });
    expect(answerTo(requirement(held(500, 10), atEnd('s2')), hump)).toMatchObject({ verdict: 'never-reached', time_s: null });
  });
});

describe('subjects', () => {
  it('the coldest and the hottest point tell which place decided', () => {
    const field: FieldFunction = (x, t) => t * (1 + 10 * (x - 0.03) ** 2);
    const cold = answerTo(requirement(reaches(150), { kind: 'cycle' }, { point: 'coldest' }), field, { layers: [0.1] });
    expect(cold.time_s).toBeCloseTo(150, 6);
    expect(cold.position_m).toBeCloseTo(0.03, 9);
    const hot = answerTo(requirement(below(100), { kind: 'cycle' }, { point: 'hottest' }), field, { layers: [0.1] });
    expect(hot.position_m).toBe(0.1);
    expect(hot.margin).toBeCloseTo(100 - 200 * 1.049, 9);
  });

  it('a probe has no place to tell, a difference is in K', () => {
    expect(answerTo(requirement(reaches(50)), ramp).position_m).toBeNull();
    const field: FieldFunction = (x, t) => 100 + t * x;
    const part = answerTo(requirement(below(30), { kind: 'cycle' }, { difference: 'part' }), field, {
      layers: [0.1, 0.1],
      materials: ['a', 'b'],
    });
    expect(part).toMatchObject({ unit: 'K', verdict: 'not-met', position_m: null });
    expect(part.value).toBeCloseTo(40, 9);
    const material = answerTo(requirement(below(30), { kind: 'cycle' }, { difference: 'material' }), field, {
      layers: [0.1, 0.1],
      materials: ['a', 'b'],
    });
    expect(material.verdict).toBe('met');
    expect(material.value).toBeCloseTo(20, 9);
  });

  it('the hottest point follows when it leaps from one face to the other', () => {
    const leap: FieldFunction = (x, t) => (x < 0.05 ? 200 - t : 31 + t);
    const answer = answerTo(requirement(reaches(120, 'atMost'), { kind: 'cycle' }, { point: 'hottest' }), leap, {
      layers: [0.1],
    });
    expect(answer.verdict).toBe('met');
    expect(answer.time_s).toBeCloseTo(80, 3);
    const lowest = answerTo(requirement(reaches(115, 'atMost'), { kind: 'cycle' }, { point: 'hottest' }), leap, {
      layers: [0.1],
    });
    expect(lowest.verdict).toBe('never-reached');
    expect(lowest.value).toBeCloseTo(115.5, 2);
  });
});

describe('a run that stopped early', () => {
  const stopped = (asked: Requirement, until: number) => answerTo(asked, ramp, { play: { steps: 100, until } });

  it('leaves open what is not decided', () => {
    for (const asked of [
      requirement(reaches(150)),
      requirement(reaches(150), within(140)),
      requirement(below(500)),
      requirement(held(50, 100)),
      requirement(below(500), atEnd('s2')),
      requirement(held(50, 100), atEnd('s2')),
      requirement(reaches(10), stage('s2')),
    ]) {
      expect(stopped(asked, 90)).toMatchObject({
        verdict: 'cannot-be-judged',
        met: null,
        time_s: null,
        stage: null,
        value: null,
        margin: null,
      });
    }
  });

  it('keeps what was decided before', () => {
    expect(stopped(requirement(reaches(60)), 90).verdict).toBe('met');
    expect(stopped(requirement(below(60)), 90).verdict).toBe('not-met');
    expect(stopped(requirement(held(50, 30)), 90).verdict).toBe('met');
    expect(stopped(requirement(below(500), stage('s1')), 100).verdict).toBe('met');
    expect(stopped(requirement(reaches(500), stage('s1')), 120).verdict).toBe('never-reached');
    expect(stopped(requirement(reaches(100), atEnd('s1')), 120).verdict).toBe('met');
    expect(stopped(requirement(held(50, 100), stage('s1')), 100).verdict).toBe('not-met');
    expect(stopped(requirement(reaches(30), within(5)), 90)).toMatchObject({ verdict: 'not-met', margin: -5 });
  });

  it('knows that a time has run out, though not by how much', () => {
    expect(stopped(requirement(reaches(150), within(60)), 90)).toMatchObject({
      verdict: 'not-met',
      time_s: null,
      margin: null,
      value: 80,
    });
  });

  it('before its first step has nothing to say', () => {
    const answer = answerTo(requirement(below(500)), ramp, { play: { until: 0 } });
    expect(answer.verdict).toBe('cannot-be-judged');
    expect(answer.spans).toEqual([{ from_s: 0, to_s: 200, kind: 'counting' }]);
  });
});
