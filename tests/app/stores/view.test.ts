import { createPinia, setActivePinia } from 'pinia';
import { beforeEach, describe, expect, it } from 'vitest';
import { nextTick } from 'vue';
import { useViewStore } from '../../../app/stores';

beforeEach(() => {
  localStorage.clear();
  setActivePinia(createPinia());
});

describe('the time axis', () => {
  it('that shows the whole cycle goes on showing it when the cycle grows', () => {
    const view = useViewStore();
    view.fitTo(100);
    expect(view.range).toEqual([0, 100]);
    view.fitTo(150);
    expect(view.range).toEqual([0, 150]);
  });

  it('that is zoomed in stays where it is, and inside', () => {
    const view = useViewStore();
    view.fitTo(100);
    view.range = [40, 80];
    view.time = 75;
    view.fitTo(60);
    expect([view.range, view.time]).toEqual([[40, 60], 60]);
    view.fitTo(30);
    expect([view.range, view.time]).toEqual([[0, 30], 30]);
  });
});

describe('preferences', () => {
  it('outlast the window', async () => {
    const view = useViewStore();
    view.units = 'US';
    view.theme = 'dark';
    view.setOpen('cycle', true);
    await nextTick();
    setActivePinia(createPinia());
    const next = useViewStore();
    expect([next.units, next.theme, next.isOpen('cycle'), next.isOpen('materials')]).toEqual(['US', 'dark', true, false]);
  });

  it('that are nonsense are left aside', () => {
    localStorage.setItem('soakwright.view', '{"units":"furlongs"}');
    expect(useViewStore().units).toBe('SI');
    localStorage.setItem('soakwright.view', 'no JSON');
    setActivePinia(createPinia());
    expect(useViewStore().units).toBe('SI');
  });
});

it('a second wish for the same place is a new wish', () => {
  const view = useViewStore();
  view.focusOn('title');
  const first = view.focusWish;
  view.focusOn('title');
  expect(view.focusWish).not.toEqual(first);
});
