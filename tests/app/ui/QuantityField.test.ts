import { mount } from '@vue/test-utils';
import { describe, expect, it } from 'vitest';
import { nextTick } from 'vue';
import QuantityField from '../../../app/ui/QuantityField.vue';

const spec = { name: 'Thickness', quantity: 'length' as const, bounds: { above: 0 } };

async function focused(props: Partial<InstanceType<typeof QuantityField>['$props']> = {}) {
  const field = mount(QuantityField, { props: { spec, value: 0.075, system: 'SI', ...props }, attachTo: document.body });
  const input = field.get('input');
  await input.trigger('focus');
  return { field, input };
}

describe('a quantity field', () => {
  it('names its unit', async () => {
    const { input } = await focused();
    expect(input.attributes('aria-label')).toBe('Thickness, mm');
  });

  it('reads back what it understood, and shows what that would do', async () => {
    const { field, input } = await focused();
    await input.setValue('3 in');
    expect(field.text()).toContain('= 76.2 mm');
    expect(field.emitted('draft')).toEqual([[{ value: 0.0762, text: '76.2 mm', typed: '3 in' }]]);
    expect(field.emitted('commit')).toBeUndefined();
  });

  it('keeps on Enter', async () => {
    const { field, input } = await focused();
    await input.setValue('80');
    await input.trigger('keydown', { key: 'Enter' });
    expect(field.emitted('commit')).toEqual([[{ value: 0.08, text: '80 mm' }]]);
  });

  it('keeps on leaving', async () => {
    const { field, input } = await focused();
    await input.setValue('80 mm');
    await input.trigger('blur');
    expect(field.emitted('commit')).toHaveLength(1);
  });

  it('keeps nothing when nothing was typed', async () => {
    const { field, input } = await focused();
    await input.trigger('keydown', { key: 'Enter' });
    await input.trigger('blur');
    expect(field.emitted('commit')).toBeUndefined();
  });

  it('restores on Esc, and takes the trial back', async () => {
    const { field, input } = await focused();
    await input.setValue('80');
    await input.trigger('keydown', { key: 'Escape' });
    await nextTick();
    expect((input.element as HTMLInputElement).value).toBe('75 mm');
    expect(field.emitted('drop')).toHaveLength(1);
    await input.trigger('blur');
    expect(field.emitted('commit')).toBeUndefined();
  });

  it('refuses nonsense in place, and keeps the text after it was left', async () => {
    const { field, input } = await focused();
    await input.setValue('8 k');
    expect(input.attributes('aria-invalid')).toBe('true');
    await input.trigger('blur');
    expect((input.element as HTMLInputElement).value).toBe('8 k');
    expect(field.find('.said.refused').text()).toMatch(/8 k/);
    expect(field.emitted('commit')).toBeUndefined();
  });

  it('takes the trial back once the text is refused', async () => {
    const { field, input } = await focused();
    await input.setValue('8');
    await input.setValue('8 k');
    expect(field.emitted('draft')).toHaveLength(1);
    expect(field.emitted('drop')).toHaveLength(1);
  });

  it('asks which of two readings is meant', async () => {
    const { field, input } = await focused();
    await input.setValue('1,234');
    const choices = field.findAll('button');
    expect(choices.map((choice) => choice.text())).toEqual(['1.234 mm', '1234 mm']);
    await choices[1].trigger('click');
    expect(field.emitted('commit')).toEqual([[{ value: 1.234, text: '1234 mm' }]]);
  });

  it('begins with what was typed, rather than with its conversion', async () => {
    const { input } = await focused({ value: 0.0762, typed: '3 in' });
    expect((input.element as HTMLInputElement).value).toBe('3 in');
  });

  it('follows the plan while it is not typed in', async () => {
    const { field, input } = await focused();
    await field.setProps({ value: 0.09 });
    expect((input.element as HTMLInputElement).value).toBe('90 mm');
    await field.setProps({ system: 'US' });
    expect((input.element as HTMLInputElement).value).toBe('3.54331 in');
  });

  it('shows what is wrong with the number in the plan', async () => {
    const field = mount(QuantityField, { props: { spec, value: 9, system: 'SI', problem: 'must be at most 1 m, got 9' } });
    expect(field.text()).toContain('Thickness must be at most 1000 mm, got 9000 mm');
    expect(field.get('input').attributes('aria-invalid')).toBe('true');
  });
});
