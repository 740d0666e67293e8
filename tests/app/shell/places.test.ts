import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { effectScope, nextTick } from 'vue';
import { fieldWords } from '../../../app/shell/fieldWords';
import { fieldOf, tableOf, useFocusWish } from '../../../app/shell/useFocusWish';
import { useProjectStore, useViewStore } from '../../../app/stores';
import { lining } from '../support/lining';

const plan = lining();

it('places are said as a person knows them', () => {
  expect(fieldWords(['part', 'layers', 2, 'thickness'], plan)).toBe('Thickness of Shell');
  expect(fieldWords(['cycle', 'stages', 1, 'end', 'after'], plan)).toBe('Length of Soak');
  expect(fieldWords(['requirements', 2, 'must', 'limit'], plan)).toBe('Limit of requirements[2]');
  expect(fieldWords(['settings', 'step'], plan)).toBe('Step of the solver');
  expect(fieldWords(['title'], plan)).toBe('Title');
});

it('every place of the document has its table', () => {
  expect(['part.layers[0].thickness', 'initial.temperature', 'part.faces.end.name', 'materials[0].density'].map(tableOf)).toEqual(
    ['part', 'part', 'exposure', 'materials'],
  );
  expect(
    ['cycle.stages[0].end', 'cycle.stages[0].exposures.start.kind', 'probes[0]', 'settings.step', 'title'].map(tableOf),
  ).toEqual(['cycle', 'exposure', 'probes', 'solver', null]);
});

describe('the focus', () => {
  beforeEach(() => setActivePinia(createPinia()));
  afterEach(() => {
    document.body.innerHTML = '';
  });

  const fields = (...places: string[]): void => {
    document.body.innerHTML = places.map((place) => `<input data-place="${place}">`).join('');
  };

  it('goes to the field that says most of the place', () => {
    fields('part.layers[0].thickness', 'part.layers[1].name', 'part.layers[1].thickness');
    expect(fieldOf('part.layers[1].thickness', document)?.dataset['place']).toBe('part.layers[1].thickness');
    expect(fieldOf('part.layers[1].contact', document)?.dataset['place']).toBe('part.layers[1].name');
    expect(fieldOf('probes[0]', document)).toBeNull();
  });

  it('follows a wish into a closed table and to its stage', async () => {
    useProjectStore().open(plan, null);
    const scope = effectScope();
    scope.run(() => useFocusWish(() => document));
    fields('cycle.stages[1].end.after');
    useViewStore().focusOn('cycle.stages[1].end.after');
    await nextTick();
    await nextTick();
    await nextTick();
    expect(useViewStore().isOpen('cycle')).toBe(true);
    expect(useViewStore().selectedStage).toBe('soak');
    expect((document.activeElement as HTMLElement).dataset['place']).toBe('cycle.stages[1].end.after');
    scope.stop();
  });
});
