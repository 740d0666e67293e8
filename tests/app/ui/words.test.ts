import { describe, expect, it } from 'vitest';
import { marginInWords, placeInWords, problemInUnits, requirementInWords, verdictNow, whereInWords } from '../../../app/ui';
import type { Answer, Requirement } from '../../../solver/model';
import { lining } from '../support/lining';

const plan = lining();
const [held, below, difference] = plan.requirements;

describe('a requirement in words', () => {
  it.each<[string, Requirement, string]>([
    ['held', held, 'Coldest point ≥ 108 °C for 1 h'],
    ['below, in a stage', below, 'Middle ≤ 400 °C in Soak'],
    ['within a time', difference, 'Difference in one material ≤ 200 K within 2 h of the start of Heat'],
    [
      'cools down',
      {
        ...below,
        of: { point: 'hottest' },
        must: { kind: 'reaches', sense: 'atMost', limit: 50 },
        counts: { kind: 'stageEnd', stage: 'rest' },
      },
      'Hottest point ≤ 50 °C at the end of Rest',
    ],
    ['stays above', { ...below, must: { kind: 'staysAbove', limit: 50 }, counts: { kind: 'cycle' } }, 'Middle ≥ 50 °C'],
  ])('%s', (_, requirement, words) => expect(requirementInWords(requirement, plan, 'SI')).toBe(words));

  it('in US units, a difference has no offset', () => {
    expect(requirementInWords(held, plan, 'US')).toBe('Coldest point ≥ 226.4 °F for 1 h');
    expect(requirementInWords({ ...difference, counts: { kind: 'cycle' } }, plan, 'US')).toBe(
      'Difference in one material ≤ 360 F°',
    );
  });

  it('says what the limit column leaves out', () => {
    expect(whereInWords(held, plan)).toBe('for 1 h, whole cycle');
    expect(whereInWords(below, plan)).toBe('always, in Soak');
  });

  it('of a probe or stage that is gone still says something', () => {
    expect(requirementInWords({ ...below, of: { probe: 'gone' } }, plan, 'SI')).toBe('probe ≤ 400 °C in Soak');
  });
});

it('places are said as a planner would', () => {
  expect(plan.probes.map(({ at }) => placeInWords(at, plan, 'SI'))).toEqual([
    'Hot face',
    'middle of Backing',
    'Shell side of Backing / Shell',
    '200 mm deep',
  ]);
  expect(placeInWords({ fraction: 0.25 }, plan, 'US')).toBe('25 % into the part');
});

const answer: Answer = {
  requirement: 'r1',
  name: '',
  verdict: 'met',
  met: true,
  time_s: 60,
  stage: 'heat',
  stage_time_s: 60,
  value: 3600,
  limit: 108,
  margin: 13440,
  unit: 's',
  margin_unit: 's',
  uncertainty: null,
  value_uncertainty: null,
  time_uncertainty_s: null,
  position_m: null,
  spans: [],
};

describe('an answer in words', () => {
  it('has a margin with its sign and unit', () => {
    expect(marginInWords(answer, 'SI')).toBe('+3 h 44 min');
    expect(marginInWords({ ...answer, margin: -26.4, margin_unit: 'K' }, 'SI')).toBe('−26 K');
    expect(marginInWords({ ...answer, margin: 1.25, margin_unit: 'K' }, 'SI')).toBe('+1.3 K');
    expect(marginInWords({ ...answer, margin: 10, margin_unit: 'K' }, 'US')).toBe('+18 F°');
    expect(marginInWords({ ...answer, margin: null }, 'SI')).toBe('');
  });

  it('has its doubt beside it once that is known, and digits that follow the doubt', () => {
    const kelvin = { ...answer, margin: 26.4321, margin_unit: 'K' as const };
    expect(marginInWords({ ...kelvin, uncertainty: 17 }, 'SI')).toBe('+26 K ± 17 K');
    expect(marginInWords({ ...kelvin, uncertainty: 0.4 }, 'SI')).toBe('+26.4 K ± 0.4 K');
    expect(marginInWords({ ...kelvin, uncertainty: 0.0001 }, 'SI')).toBe('+26.43 K ± 0.01 K');
    expect(marginInWords({ ...answer, uncertainty: 120 }, 'SI')).toBe('+3 h 44 min ± 2 min 00 s');
    expect(marginInWords({ ...answer, uncertainty: 0.2 }, 'SI')).toBe('+3 h 44 min ± 1 s');
  });

  it('stays what it was until waiting has lasted, and is then called old', () => {
    expect(verdictNow(answer, { state: 'solving', waiting: false })).toEqual({ sign: 'met', word: 'Met', old: false });
    expect(verdictNow(answer, { state: 'solving', waiting: true })).toEqual({ sign: 'wait', word: 'Solving', old: true });
    expect(verdictNow(answer, { state: 'stale', waiting: true })).toEqual({ sign: 'met', word: 'Met', old: true });
    expect(verdictNow(undefined, { state: 'failed', waiting: true })).toEqual({ sign: 'wait', word: 'Not run', old: false });
  });

  it('never calls a margin thin as long as its uncertainty is unknown', () => {
    expect(verdictNow({ ...answer, margin: 0.001 }, { state: 'live', waiting: false }).sign).toBe('met');
  });
});

describe('a problem on screen', () => {
  it('speaks in the units that are shown', () => {
    expect(problemInUnits('must be more than 0 m, got -0.004', 'SI')).toBe('must be more than 0 mm, got −4 mm');
    expect(problemInUnits('must be at most 0.0254 m, the thickness of the part, got 0.0508', 'US')).toBe(
      'must be at most 1 in, the thickness of the part, got 2 in',
    );
    expect(problemInUnits('must be more than -273.15 °C, got -300', 'SI')).toBe('must be more than −273.15 °C, got −300 °C');
    expect(problemInUnits('must be more than 0 W/(m·K), got 0', 'SI')).toBe('must be more than 0 W/m·K, got 0 W/m·K');
    expect(problemInUnits('must be more than 0 kg/m³, got -1', 'SI')).toBe('must be more than 0 kg/m³, got −1 kg/m³');
  });

  it('without a quantity stays as it is', () => {
    const message = 'must be the id of a probe of this plan, got "m 4"';
    expect(problemInUnits(message, 'US')).toBe(message);
  });
});
