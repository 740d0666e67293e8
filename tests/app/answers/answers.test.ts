import { describe, expect, it } from 'vitest';
import { chipOf, countSigns, fitChips, verdictChanges, type ChipContext } from '../../../app/answers/chips';
import { firstViews } from '../../../app/answers/firsts';
import type { Answer, FirstAnswers, Verdict } from '../../../solver/model';
import { lining } from '../support/lining';

const project = lining();
const answer = (requirement: string, verdict: Verdict, more: Partial<Answer> = {}): Answer => ({
  requirement,
  name: requirement,
  verdict,
  met: verdict === 'met' || verdict === 'thin' ? true : verdict === 'cannot-be-judged' ? null : false,
  time_s: 3600,
  stage: 'heat',
  stage_time_s: 3600,
  value: 100,
  limit: 108,
  margin: 12,
  unit: '°C',
  margin_unit: 'K',
  uncertainty: null,
  value_uncertainty: null,
  time_uncertainty_s: null,
  position_m: null,
  spans: [],
  ...more,
});
const context = (answers: Answer[], run = { state: 'live', waiting: false }): ChipContext => ({
  project,
  answers,
  run,
  system: 'SI',
});
const [held, below] = project.requirements;

describe('a chip', () => {
  it('says verdict, when and margin', () => {
    const chip = chipOf(below, context([answer('r2', 'met', { margin: 50 })]));
    expect([chip.sign, chip.word, chip.lead, chip.when, chip.margin]).toEqual([
      'met',
      'Met',
      'closest at',
      '1 h 00 min',
      '+50 K',
    ]);
    expect(chipOf(below, context([answer('r2', 'not-met', { margin: -8 })]))).toMatchObject({
      lead: 'worst at',
      margin: '−8.0 K',
    });
    expect(chipOf(held, context([answer('r1', 'met')])).lead).toBe('');
  });

  it('without a margin says how far it came', () => {
    expect(chipOf(held, context([answer('r1', 'never-reached', { margin: null, value: 96.4 })])).remark).toBe('came to 96 °C');
    expect(chipOf(held, context([answer('r1', 'not-met', { margin: null, value: 1800, unit: 's' })])).remark).toBe(
      'held for 30 min at most',
    );
    expect(chipOf(held, context([answer('r1', 'cannot-be-judged', { margin: null })])).remark).toBe('The run ended before.');
  });
});

describe('more chips than fit', () => {
  const verdicts: Verdict[] = ['met', 'not-met', 'met', 'cannot-be-judged', 'never-reached', 'met'];
  const chips = verdicts.map((verdict, index) => chipOf({ ...held, id: `q${index}` }, context([answer(`q${index}`, verdict)])));

  it('stand worst first, the rest as counts', () => {
    const { shown, rest } = fitChips(chips, 4);
    expect(shown.map(({ id }) => id)).toEqual(['q1', 'q4', 'q3', 'q0']);
    expect(countSigns(rest)).toEqual([{ sign: 'met', count: 2 }]);
  });

  it('do not change places while they are solved again', () => {
    const busy = { state: 'solving', waiting: true };
    const waiting = verdicts.map((verdict, index) =>
      chipOf({ ...held, id: `q${index}` }, context([answer(`q${index}`, verdict)], busy)),
    );
    expect(fitChips(waiting, 4).shown.map(({ id }) => id)).toEqual(['q1', 'q4', 'q3', 'q0']);
  });

  it('that fit keep the order of the plan', () => {
    expect(fitChips(chips.slice(0, 4), 4).shown.map(({ id }) => id)).toEqual(['q0', 'q1', 'q2', 'q3']);
  });
});

describe('a change of verdict', () => {
  const requirements = project.requirements;

  it('is said once, with the margin', () => {
    const before = new Map([
      ['r1', 'met'],
      ['r2', 'met'],
    ]);
    expect(verdictChanges(before, requirements, context([answer('r1', 'not-met', { margin: -4 }), answer('r2', 'met')]))).toBe(
      'Lining hot: not met, margin −4.0 K.',
    );
  });

  it('is not said of a requirement that is new', () => {
    expect(verdictChanges(new Map(), requirements, context([answer('r1', 'not-met')]))).toBe('');
  });
});

describe('first answers', () => {
  const first: FirstAnswers = {
    slowest: { position_m: 0.237, layer: 'l3', stage: 'heat', time_s: 7200 },
    hottest: { position_m: 0, layer: 'l1', time_s: 3600, temperature_C: 524.6 },
    largestDifference: { value_K: 454, time_s: 3600, between: [0.237, 0] },
    largestDifferenceInMaterial: { value_K: 188.7, time_s: 3000, between: [0.225, 0], material: 'brick' },
  };

  it('say what, where and when', () => {
    const [slowest, hottest, difference] = firstViews(first, project, 'SI');
    expect([slowest.figure, slowest.beside, slowest.below]).toEqual(['Shell', 'at 237 mm', 'last to settle, 2 h 00 min']);
    expect([hottest.figure, hottest.beside, hottest.below]).toEqual(['525 °C', 'Hot face', 'at 1 h 00 min']);
    expect([difference.figure, difference.beside, difference.below]).toEqual(['454 K', 'at 1 h 00 min', 'in one material 189 K']);
    expect(difference.hint).toBe('Hot face to Cold face. Within one material 189 K, Brick, Hot face to 225 mm, at 50 min');
  });

  it('do not say twice what is the same in one material', () => {
    const within = { value_K: 454, time_s: 3600, between: [0.237, 0] as [number, number], material: 'brick' };
    const same = { ...first, largestDifferenceInMaterial: within };
    const [, , difference] = firstViews(same, project, 'SI');
    expect([difference.beside, difference.below]).toEqual(['Hot face to Cold face', 'at 1 h 00 min']);
  });

  it('say so where nothing changes', () => {
    const none = { slowest: null, hottest: null, largestDifference: null, largestDifferenceInMaterial: null };
    expect(firstViews(none, project, 'SI').map(({ figure, time_s }) => [figure, time_s])).toEqual([
      ['–', null],
      ['–', null],
      ['–', null],
    ]);
  });
});
