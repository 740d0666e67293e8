import { mount, type VueWrapper } from '@vue/test-utils';
import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { nextTick } from 'vue';
import type { Command } from '../../../app/commands';
import { useProjectStore, useRunStore, useViewStore } from '../../../app/stores';
import { TimelinePanel } from '../../../app/timeline';
import type { CurvePicture } from '../../../app/timeline/curveChart';
import { lining } from '../support/lining';
import { giveSize } from '../support/sizes';
import { answer, openPlan } from '../support/solved';
import type { FakeSolver } from '../support/fakeSolver';

const drawn: CurvePicture[] = [];
vi.mock('../../../app/timeline/curveChart', () => ({
  createCurveChart: () => ({ draw: (picture: CurvePicture) => void drawn.push(picture), destroy: () => undefined }),
}));

const HOUR = 3600;
const CORNER = 'Gas in Heat, end of segment 1';
const thinner: Command = {
  name: 'Shell to 10 mm',
  apply: (plan) => {
    const layers = plan.part.layers.map((layer) => (layer.id === 'l3' ? { ...layer, thickness: 0.01 } : layer));
    return { ...plan, part: { ...plan.part, layers } };
  },
};
let solver: FakeSolver;
let panel: VueWrapper;

/** The panel of a plan, 1400 px wide: its plot begins at 200 px and is 1174 px long. */
async function show(plan = lining(), answered = true): Promise<void> {
  solver = openPlan(plan);
  vi.runOnlyPendingTimers();
  if (answered) answer(solver);
  panel = mount(TimelinePanel, { attachTo: document.body });
  await nextTick();
  await nextTick();
}

beforeEach(() => {
  vi.useFakeTimers();
  localStorage.clear();
  setActivePinia(createPinia());
  giveSize(1400, 380);
  drawn.length = 0;
});
afterEach(() => {
  panel.unmount();
  vi.restoreAllMocks();
  vi.useRealTimers();
});

const handle = (label: string) => panel.get(`[role="slider"][aria-label="${label}"]`);
const press = async (label: string, ...keys: string[]): Promise<void> => {
  for (const key of keys) {
    const shiftKey = key.startsWith('Shift+');
    await handle(label).trigger('keydown', { key: key.replace('Shift+', ''), shiftKey });
  }
};
const stages = () => useProjectStore().current.cycle.stages;

describe('the timeline', () => {
  it('draws every probe once, and not again while the playhead moves', async () => {
    await show();
    expect(drawn.some(({ lines }) => lines.length === 5)).toBe(true);
    const before = drawn.length;
    useViewStore().time = 3 * HOUR;
    await nextTick();
    expect(drawn).toHaveLength(before);
  });

  it('reads every series at the playhead, in the units on screen', async () => {
    await show();
    const view = useViewStore();
    view.time = 0;
    await nextTick();
    expect(panel.get('[data-series="p1"].value, b[data-series="p1"]').text()).toBe('25 °C');
    view.units = 'US';
    await nextTick();
    expect(panel.get('b[data-series="p1"]').text()).toBe('77 °F');
    view.time = 4 * HOUR;
    await nextTick();
    expect(panel.get('b[data-series="setPoint"]').text()).toBe('797 °F');
  });

  it('has the cycle, but no curves, before the first answer, and says why', async () => {
    await show(lining(), false);
    expect(panel.findAll('.band')).toHaveLength(3);
    expect(panel.find('canvas').exists()).toBe(false);
    expect(panel.get('.nothing').text()).toBe('Drawn when the first run is done.');
    expect(panel.findAll('.name').map((row) => row.text())).toContain('Middle belowWaiting');
  });

  it('greys answers of an earlier plan and says of which', async () => {
    await show();
    useProjectStore().commit(thinner);
    await nextTick();
    vi.advanceTimersByTime(1000);
    await nextTick();
    expect(panel.get('.why-stale').text()).toBe('before “Shell to 10 mm”');
    expect(panel.find('canvas.stale').exists()).toBe(true);
    answer(solver);
    await nextTick();
    expect(panel.find('.why-stale').exists()).toBe(false);
  });

  it('shows progress and a way to cancel once a run takes its time', async () => {
    await show();
    useProjectStore().commit(thinner);
    vi.advanceTimersByTime(100);
    await nextTick();
    expect(panel.get('.live').text()).toContain('Live');
    const { job, revision } = solver.asked[solver.asked.length - 1];
    solver.tell({ type: 'progress', job, revision, case: 0, time_s: 1, end_s: 2, stage: 'heat', fraction: 0.62 });
    vi.advanceTimersByTime(400);
    await nextTick();
    expect(panel.get('.live').text()).toContain('Solving 62 %');
    await panel.get('.live button').trigger('click');
    await nextTick();
    expect(useRunStore().state).toBe('cancelled');
    expect(panel.get('.live').text()).toContain('Cancelled at 40 s');
  });

  it('holds its figures for those who do not see it', async () => {
    await show();
    const texts = panel.findAll('.hidden-text p').map((twin) => twin.text());
    expect(texts.some((text) => /^Temperature\. A, Face, reaches \d+ °C at /.test(text))).toBe(true);
    expect(texts.some((text) => text.includes('Middle below: met'))).toBe(true);
    const heads = panel.findAll('.hidden-text th[scope="col"]').map((head) => head.text());
    expect(heads).toContain('A Face, °C');
  });

  it('closes a lane to its title and gives its room to others', async () => {
    await show();
    const height = () => Number.parseFloat((panel.findAll('.lane')[1].element as HTMLElement).style.height);
    const before = height();
    await panel.findAll('.title')[0].trigger('click');
    expect(panel.findAll('.title')[0].attributes('aria-expanded')).toBe('false');
    expect(height()).toBeGreaterThan(before);
  });
});

describe('keys on the playhead', () => {
  it('step by frames and by events, and go to both ends', async () => {
    await show();
    const view = useViewStore();
    await press('Playhead', 'End');
    expect(view.time).toBe(9 * HOUR);
    await press('Playhead', 'Home', 'ArrowRight');
    expect(view.time).toBe(useRunStore().frames?.time_s[1]);
    await press('Playhead', 'ArrowLeft');
    expect(view.time).toBe(0);
    view.time = 5.9 * HOUR;
    for (let i = 0; i < 20 && view.time < 6 * HOUR; i++) await press('Playhead', 'Shift+ArrowRight');
    expect(view.time).toBe(6 * HOUR);
    expect(handle('Playhead').attributes('aria-valuetext')).toBe('6 h 00 min, end of Heat');
  });

  it('zoom round the playhead and back to the whole cycle', async () => {
    await show();
    const view = useViewStore();
    view.time = 4.5 * HOUR;
    await press('Playhead', '+');
    expect(view.range[1] - view.range[0]).toBeLessThan(9 * HOUR);
    expect((view.range[0] + view.range[1]) / 2).toBeCloseTo(4.5 * HOUR, 6);
    await press('Playhead', '0');
    expect(view.range).toEqual([0, 9 * HOUR]);
  });

  it('play and pause, but leave Space to a focused button', async () => {
    await show();
    const view = useViewStore();
    await press('Playhead', ' ');
    expect(view.playing).toBe(true);
    await press('Playhead', ' ');
    expect(view.playing).toBe(false);
    await panel.get('[aria-label="Zoom in"]').trigger('keydown', { key: ' ' });
    expect(view.playing).toBe(false);
  });
});

describe('the window', () => {
  it('shows the chosen stage, and the whole cycle again', async () => {
    await show();
    const view = useViewStore();
    await panel.findAll('.band')[1].trigger('click');
    expect(view.selectedStage).toBe('soak');
    const options = panel.get('[aria-label="Window of the time axis"]').findAll('button');
    await options[1].trigger('click');
    expect(view.range).toEqual([6 * HOUR, 8 * HOUR]);
    await options[0].trigger('click');
    expect(view.range).toEqual([0, 9 * HOUR]);
  });
});

describe('a set-point', () => {
  it('goes up and down and in time by arrows as a draft, and is kept by Enter as one edit', async () => {
    await show();
    const project = useProjectStore();
    await press(CORNER, 'ArrowUp', 'Shift+ArrowUp');
    expect(stages()[0].setPoint?.segments[0]).toEqual({ to: 525 + 11 * 5, rate: 100 / 3600 });
    expect(project.committed.cycle.stages[0].setPoint?.segments[0]).toHaveProperty('to', 525);
    await press(CORNER, 'Enter');
    expect(project.undoName).toBe('Set-point of Heat to 580 °C');
    project.undo();
    expect(stages()[0].setPoint?.segments[0]).toHaveProperty('to', 525);
    expect(project.undoName).toBeNull();
  });

  it('is put back by Esc', async () => {
    await show();
    await press(CORNER, 'ArrowRight', 'ArrowRight', 'Escape');
    expect(stages()[0].setPoint?.segments[0]).toEqual({ to: 525, rate: 100 / 3600 });
    expect(useProjectStore().undoName).toBeNull();
  });

  it('is dragged by the pointer: to the side changes the time, and the axis keeps still meanwhile', async () => {
    await show();
    const corner = handle(CORNER);
    (corner.element as HTMLElement).setPointerCapture = () => undefined;
    const at = (clientX: number, clientY: number) => ({ clientX, clientY, button: 0, pointerId: 1 });
    await corner.trigger('pointerdown', at(0, 0));
    await corner.trigger('pointermove', at(117.4, 3));
    const segment = stages()[0].setPoint?.segments[0] as { to: number; rate: number };
    expect(segment.to).toBe(525);
    expect(500 / segment.rate / HOUR).toBeCloseTo(5.9, 1);
    expect(panel.findAll('.band')[0].attributes('style')).toContain('width: 898');
    await corner.trigger('pointerup');
    expect(useProjectStore().undoName).toMatch(/^Set-point of Heat to 525 °C after 5 h 5\d min$/);
  });

  it('opens its figures by a click, to be typed with units', async () => {
    await show();
    await press(CORNER, 'Enter');
    await nextTick();
    const fields = panel.get('.set-point-fields').findAll('input');
    expect(fields.map((field) => (field.element as HTMLInputElement).value)).toEqual(['525 °C', '100 K/h']);
    await fields[0].trigger('focus');
    await fields[0].setValue('1000 degF');
    await fields[0].trigger('keydown', { key: 'Enter' });
    expect((stages()[0].setPoint?.segments[0] as { to: number }).to).toBeCloseTo(537.778, 2);
    await panel.get('.set-point-fields').trigger('keydown', { key: 'Escape' });
    expect(panel.find('.set-point-fields').exists()).toBe(false);
    expect(document.activeElement?.getAttribute('aria-label')).toBe(CORNER);
  });
});

describe('the end of a stage', () => {
  it('is moved by arrows where it is a time, and has no handle where the cycle computes it', async () => {
    await show();
    expect(panel.find('[aria-label="End of stage Heat"]').exists()).toBe(false);
    expect(panel.findAll('.computed')).toHaveLength(1);
    await press('End of stage Soak', 'ArrowRight', 'Enter');
    const { end } = stages()[1];
    expect('after' in end && end.after).toBeGreaterThan(2 * HOUR);
    expect(useProjectStore().undoName).toMatch(/^Length of Soak to 2 h/);
  });

  it('never comes before the stage begins', async () => {
    await show();
    await press('End of stage Rest', ...Array.from({ length: 30 }, () => 'Shift+ArrowLeft'), 'Enter');
    const { end } = stages()[2];
    expect('after' in end && end.after).toBeGreaterThan(0);
  });

  it('has no handle while a problem keeps the plan from being drawn', async () => {
    await show();
    useProjectStore().commit({
      name: 'break',
      apply: (plan) => ({ ...plan, part: { ...plan.part, layers: [{ ...plan.part.layers[0], thickness: -1 }] } }),
    });
    await nextTick();
    expect(panel.find('[aria-label="End of stage Soak"]').exists()).toBe(false);
    expect(panel.findAll('.band')).toHaveLength(3);
  });
});

describe('requirement rows', () => {
  it('choose their requirement and take the playhead to where it was decided', async () => {
    await show();
    const view = useViewStore();
    const row = panel.findAll('.name').find((item) => item.text().startsWith('Middle below'));
    await row?.trigger('click');
    expect(view.selectedRequirement).toBe('r2');
    expect(view.time).toBeGreaterThan(0);
  });
});
