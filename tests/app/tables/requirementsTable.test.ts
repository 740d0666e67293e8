import { mount } from '@vue/test-utils';
import { createPinia, setActivePinia } from 'pinia';
import { beforeEach, describe, expect, it } from 'vitest';
import { nextTick } from 'vue';
import { RequirementsTable } from '../../../app/requirements';
import { useProjectStore, useViewStore } from '../../../app/stores';
import { lining } from '../support/lining';

beforeEach(() => {
  localStorage.clear();
  setActivePinia(createPinia());
  useProjectStore().open(lining(), null);
  useViewStore().setOpen('requirements', true);
});

const requirement = (index = 0) => useProjectStore().current.requirements[index];

describe('the requirements table', () => {
  it('without a requirement offers ways to begin, near the highest set-point', async () => {
    useProjectStore().open({ ...lining(), requirements: [] }, null);
    const table = mount(RequirementsTable);
    const ways = table.findAll('.empty button');
    expect(ways.map((way) => way.text())).toEqual(['Reach and hold', 'Reach', 'Never above', 'Never below', 'Difference']);
    await ways[0].trigger('click');
    expect(requirement().must).toEqual({ kind: 'heldFor', sense: 'atLeast', limit: 515, duration: 1800 });
    await nextTick();
    expect(useViewStore().focusWish?.place).toBe('requirements[0].must.limit');
    expect(table.find('.empty').exists()).toBe(false);
  });

  it('shows the fields of the chosen requirement as a sentence', async () => {
    const table = mount(RequirementsTable);
    useViewStore().selectedRequirement = 'r1';
    await nextTick();
    const choice = (label: string) => table.get<HTMLSelectElement>(`select[aria-label="${label}"]`);
    expect(choice('What the rule speaks of').element.value).toBe('point coldest');
    await choice('Rule').setValue('staysBelow');
    expect(requirement().must).toEqual({ kind: 'staysBelow', limit: 108 });
    await choice('Where it counts').setValue('within');
    expect(requirement().counts).toEqual({ kind: 'within', time: 3600 });
    await choice('From').setValue('soak');
    expect(requirement().counts).toEqual({ kind: 'within', time: 3600, from: 'soak' });
    await choice('What the rule speaks of').setValue('difference part');
    expect(requirement()).toMatchObject({ of: { difference: 'part' }, must: { limit: 50 } });
    expect(useProjectStore().problems).toEqual([]);
  });

  it('tells the whole in a closed head', async () => {
    useViewStore().setOpen('requirements', false);
    const table = mount(RequirementsTable);
    expect(table.get('.summary').text()).toBe('3 waiting');
  });
});
