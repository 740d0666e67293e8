import { mount, type VueWrapper } from '@vue/test-utils';
import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { nextTick } from 'vue';
import { SectionPanel } from '../../../app/section';
import { useProjectStore, useRunStore, useViewStore } from '../../../app/stores';
import type { FakeSolver } from '../support/fakeSolver';
import { lining } from '../support/lining';
import { giveSize } from '../support/sizes';
import { answer, openPlan } from '../support/solved';

const HOUR = 3600;
let solver: FakeSolver;
let panel: VueWrapper;

/** The panel of a plan in 700 × 350 px: 237 mm of part between 116 and 592 px. */
async function show(plan = lining(), answered = true): Promise<void> {
  solver = openPlan(plan);
  vi.runOnlyPendingTimers();
  if (answered) answer(solver);
  panel = mount(SectionPanel, { attachTo: document.body });
  await nextTick();
  await nextTick();
}

beforeEach(() => {
  vi.useFakeTimers();
  localStorage.clear();
  setActivePinia(createPinia());
  giveSize(700, 350);
});
afterEach(() => {
  panel.unmount();
  vi.restoreAllMocks();
  vi.useRealTimers();
});

const handle = (label: string) => panel.get(`[role="slider"][aria-label="${label}"]`);
const press = async (label: string, ...keys: string[]): Promise<void> => {
  for (const key of keys) {
    await handle(label).trigger('keydown', { key: key.replace('Shift+', ''), shiftKey: key.startsWith('Shift+') });
  }
};
const drag = async (label: string, by: number, end: 'pointerup' | 'pointercancel' = 'pointerup'): Promise<void> => {
  const element = handle(label).element as HTMLElement;
  element.setPointerCapture = () => undefined;
  const at = (clientX: number) => ({ clientX, clientY: 0, button: 0, pointerId: 1 });
  await handle(label).trigger('pointerdown', at(0));
  await handle(label).trigger('pointermove', at(by / 2));
  await handle(label).trigger('pointermove', at(by));
  await handle(label).trigger(end, at(by));
};
const thicknesses = () => useProjectStore().current.part.layers.map(({ thickness }) => thickness);

describe('the section', () => {
  it('shows the layers with their names, and the profile of the moment', async () => {
    await show();
    expect(panel.findAll('.layer[aria-label]').map((layer) => layer.attributes('aria-label'))).toEqual([
      'Lining, 150 mm, Brick',
      'Backing, 75 mm, Brick',
      'Shell, 12 mm, Steel',
    ]);
    const line = () => panel.get('path.line').attributes('d');
    const start = line();
    useViewStore().time = 5 * HOUR;
    await nextTick();
    expect(line()).not.toBe(start);
    expect(panel.get('.words .num').text()).toBe('at 5 h 00 min');
  });

  it('reads the probes, letters as on the timeline, in the units on screen', async () => {
    await show();
    const pills = () => panel.findAll('.pill').map((pill) => pill.text());
    expect(pills()).toEqual(['A25 °C', 'B25 °C', 'C25 °C', 'D25 °C']);
    useViewStore().units = 'US';
    await nextTick();
    await nextTick();
    expect(pills()[0]).toBe('A77 °F');
  });

  it('says which way the heat flows at both faces', async () => {
    await show();
    useViewStore().time = 5 * HOUR;
    await nextTick();
    const [start, end] = panel.findAll('.flow').map((flow) => flow.text());
    expect(start).toMatch(/kW\/m²in$/);
    expect(end).toMatch(/kW\/m²out$/);
    expect(panel.findAll('.side .words')[0].text()).toBe('Gas525 °C');
  });

  it('changes to heat flow and back', async () => {
    await show();
    const view = useViewStore();
    view.time = 5 * HOUR;
    await panel.get('[aria-label="What the section shows"]').findAll('button')[1].trigger('click');
    await nextTick();
    expect(view.profile).toBe('flux');
    expect(panel.get('path.line').attributes('d')).not.toContain('NaN');
    expect(panel.get('path.envelope').attributes('d')).toBe('');
    expect(panel.get('.bar').text()).toContain('kW/m²');
  });

  it('is drawn before the first answer, without a profile, and says so', async () => {
    await show(lining(), false);
    expect(panel.find('path.line').exists()).toBe(false);
    expect(panel.findAll('.pill')).toHaveLength(4);
    expect(panel.get('.note').text()).toBe('Drawn when the first run is done.');
  });

  it('says what it shows to those who do not see it, once the playhead rests', async () => {
    await show();
    const view = useViewStore();
    const sentence = () => panel.get('.hidden-text p').text();
    view.playing = true;
    view.time = 5 * HOUR;
    await nextTick();
    expect(sentence()).toContain('at 0 s');
    view.playing = false;
    await nextTick();
    await nextTick();
    expect(sentence()).toContain('at 5 h 00 min');
    expect(panel.findAll('.hidden-text tbody tr')).toHaveLength(6);
  });

  it('keeps the last answer, greyed, while a newer one is waited for', async () => {
    await show();
    const line = panel.get('path.line').attributes('d');
    await press('Far edge of Lining', 'ArrowRight', 'Enter');
    vi.advanceTimersByTime(1000);
    await nextTick();
    expect(panel.get('.note').text()).toBe('before “Edge of Lining to 150.5 mm”');
    expect(panel.find('.moving.stale').exists()).toBe(true);
    answer(solver);
    await nextTick();
    await nextTick();
    expect(panel.find('.note').exists()).toBe(false);
    expect(panel.get('path.line').attributes('d')).not.toBe(line);
  });
});

describe('an edge of a layer', () => {
  it('moves by arrows in round steps, ten with Shift, as one edit', async () => {
    await show();
    const project = useProjectStore();
    await press('Far edge of Lining', 'ArrowRight', 'Shift+ArrowLeft');
    expect(thicknesses()[0]).toBeCloseTo(0.1455, 12);
    expect(thicknesses()[1]).toBeCloseTo(0.0795, 12);
    expect(project.committed.part.layers[0].thickness).toBe(0.15);
    await press('Far edge of Lining', 'Enter');
    expect(project.undoName).toBe('Edge of Lining to 145.5 mm');
    project.undo();
    expect(project.undoName).toBeNull();
  });

  it('follows the pointer in round millimetres, and is put back when the drag is broken off', async () => {
    await show();
    await drag('Far edge of Lining', 40);
    expect(thicknesses()).toEqual([0.17, 0.055, 0.012]);
    await drag('Far edge of Lining', 40, 'pointercancel');
    expect(thicknesses()).toEqual([0.17, 0.055, 0.012]);
  });

  it('never uses up the layer after it, and at the end face makes the part thicker', async () => {
    await show();
    await drag('Far edge of Lining', 4000);
    expect(thicknesses()[1]).toBeGreaterThan(0);
    useProjectStore().undo();
    await drag('Far edge of Shell', 20);
    expect(thicknesses()[2]).toBeCloseTo(0.022, 6);
  });

  it('chooses its layer by a click', async () => {
    await show();
    await press('Far edge of Backing', 'Enter');
    expect(useViewStore().selectedLayer).toBe('l2');
  });
});

describe('a probe', () => {
  const place = (index: number) => useProjectStore().current.probes[index].at;

  it('moves through the part and ties itself to an edge that it comes near', async () => {
    await show();
    await drag('Probe D, Deep', -40);
    expect(place(3)).toEqual({ depth: 0.18 });
    await drag('Probe D, Deep', -58);
    expect(place(3)).toEqual({ interface: 'l1', side: 'after' });
    expect(useProjectStore().undoName).toBe('Place of Deep to Backing side of Lining / Backing');
  });

  it('is put back by Esc, and chosen by a click', async () => {
    await show();
    await press('Probe D, Deep', 'ArrowLeft', 'Escape');
    expect(place(3)).toEqual({ depth: 0.2 });
    await press('Probe D, Deep', 'Enter');
    expect(useViewStore().selectedProbe).toBe('p4');
  });

  it('has no handle while a problem keeps the plan from being drawn', async () => {
    await show();
    useProjectStore().commit({
      name: 'break',
      apply: (plan) => ({ ...plan, part: { ...plan.part, layers: [{ ...plan.part.layers[0], thickness: -1 }] } }),
    });
    await nextTick();
    expect(handle('Probe A, Face').attributes('tabindex')).toBe('-1');
    expect(useRunStore().laid).toBeNull();
    expect(panel.findAll('.layer[aria-label]')).toHaveLength(3);
  });
});
