import { mount } from '@vue/test-utils';
import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { nextTick } from 'vue';
import { AnswersStrip } from '../../../app/answers';
import { setLimit } from '../../../app/commands';
import { useProjectStore, useRunStore, useViewStore } from '../../../app/stores';
import type { Answer, Verdict } from '../../../solver/model';
import { fakeSolver, type FakeSolver } from '../support/fakeSolver';
import { lining } from '../support/lining';

let solver: FakeSolver;

beforeEach(() => {
  vi.useFakeTimers();
  setActivePinia(createPinia());
  useProjectStore().open(lining(), null);
  solver = fakeSolver();
  useRunStore().connect(solver);
  vi.advanceTimersByTime(0);
});
afterEach(() => vi.useRealTimers());

const answer = (requirement: string, verdict: Verdict): Answer => ({
  requirement,
  name: requirement,
  verdict,
  met: verdict === 'met',
  time_s: 1800,
  stage: 'heat',
  stage_time_s: 1800,
  value: 100,
  limit: 108,
  margin: verdict === 'met' ? 5 : -5,
  unit: '°C',
  margin_unit: 'K',
  uncertainty: null,
  position_m: null,
  spans: [],
});

async function finish(...verdicts: Verdict[]): Promise<void> {
  const nothing = { slowest: null, hottest: null, largestDifference: null, largestDifferenceInMaterial: null };
  solver.finish({ answers: verdicts.map((verdict, index) => answer(`r${index + 1}`, verdict)), first: nothing, stability: null });
  await nextTick();
}

async function edit(): Promise<void> {
  const [requirement] = useProjectStore().current.requirements;
  useProjectStore().commit(setLimit(requirement, { value: requirement.must.limit + 1, text: '' }));
  vi.advanceTimersByTime(60);
  await nextTick();
}

describe('the answers strip', () => {
  it('has a chip a requirement, waiting until the first run is done', async () => {
    const strip = mount(AnswersStrip);
    expect(strip.findAll('.chip').map((chip) => chip.get('b').text())).toEqual(['Solving', 'Solving', 'Solving']);
    await finish('met', 'not-met', 'met');
    expect(strip.findAll('.chip').map((chip) => chip.get('b').text())).toEqual(['Met', 'Not met', 'Met']);
  });

  it('says a change of verdict aloud, and nothing else', async () => {
    const strip = mount(AnswersStrip);
    const said = () => strip.get('[aria-live="polite"]').text();
    await finish('met', 'met', 'met');
    expect(said()).toBe('');
    await edit();
    await finish('met', 'met', 'met');
    expect(said()).toBe('');
    await edit();
    await finish('met', 'not-met', 'met');
    expect(said()).toBe('Middle below: not met, margin −5.0 K.');
  });

  it('keeps the last verdicts in sight, greyed once solving takes long', async () => {
    const strip = mount(AnswersStrip);
    await finish('met', 'met', 'met');
    await edit();
    expect(strip.findAll('.chip.old')).toHaveLength(0);
    vi.advanceTimersByTime(300);
    await nextTick();
    expect(strip.findAll('.chip.old')).toHaveLength(3);
    expect(strip.get('.chip').text()).toContain('was +5.0 K');
  });

  it('leads from a chip to its moment and its row', async () => {
    const strip = mount(AnswersStrip);
    await finish('met', 'not-met', 'met');
    await strip.findAll('.chip')[1].trigger('click');
    expect(useViewStore().time).toBe(1800);
    expect(useViewStore().focusWish?.place).toBe('requirements[1].name');
  });
});
