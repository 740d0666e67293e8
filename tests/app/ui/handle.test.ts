import { mount } from '@vue/test-utils';
import { describe, expect, it } from 'vitest';
import { DragHandle, moveTo, useHold, writeText } from '../../../app/ui';

const make = (more: object = {}) => {
  const handle = mount(DragHandle, { props: { x: 10, y: 20, label: 'End of Heat', text: '2 h', now: 2, ...more } });
  (handle.element as HTMLElement).setPointerCapture = () => undefined;
  return handle;
};
const at = (clientX: number, clientY: number, button = 0) => ({ clientX, clientY, button, pointerId: 1 });

describe('a handle', () => {
  it('is a slider that says what it is and where', () => {
    expect(make({ min: 0 }).attributes()).toMatchObject({
      role: 'slider',
      tabindex: '0',
      'aria-label': 'End of Heat',
      'aria-valuetext': '2 h',
      'aria-valuenow': '2',
      'aria-valuemin': '0',
    });
  });

  it('counts pixels from where it was taken, and keeps at the end', async () => {
    const handle = make();
    await handle.trigger('pointerdown', at(100, 50));
    await handle.trigger('pointermove', at(104, 50));
    await handle.trigger('pointermove', at(130, 45));
    await handle.trigger('pointerup', at(130, 45));
    expect(handle.emitted('drag')).toEqual([[{ x: 4, y: 0 }], [{ x: 30, y: -5 }]]);
    expect(handle.emitted('keep')).toHaveLength(1);
    expect(handle.emitted('open')).toBeUndefined();
  });

  it('opens by a click that hardly moves, and takes no other button', async () => {
    const handle = make();
    await handle.trigger('pointerdown', at(100, 50));
    await handle.trigger('pointermove', at(102, 51));
    await handle.trigger('pointerup', at(102, 51));
    expect(handle.emitted('drag')).toBeUndefined();
    expect(handle.emitted('open')).toHaveLength(1);
    await handle.trigger('pointerdown', at(0, 0, 2));
    await handle.trigger('pointermove', at(50, 50));
    expect(handle.emitted('drag')).toBeUndefined();
  });

  it('is put back by Esc in the middle of a drag, and hears no more of it', async () => {
    const handle = make();
    await handle.trigger('pointerdown', at(0, 0));
    await handle.trigger('pointermove', at(20, 0));
    await handle.trigger('keydown', { key: 'Escape' });
    await handle.trigger('pointermove', at(40, 0));
    await handle.trigger('pointerup', at(40, 0));
    expect(handle.emitted('restore')).toHaveLength(1);
    expect(handle.emitted('drag')).toHaveLength(1);
    expect(handle.emitted('keep')).toBeUndefined();
  });

  it('adds up arrow steps, ten with Shift, until Enter or leaving keeps them', async () => {
    const handle = make({ axis: 'both' });
    await handle.trigger('keydown', { key: 'ArrowRight' });
    await handle.trigger('keydown', { key: 'ArrowUp', shiftKey: true });
    await handle.trigger('keydown', { key: 'Enter' });
    await handle.trigger('keydown', { key: 'ArrowLeft' });
    await handle.trigger('blur');
    expect(handle.emitted('steps')).toEqual([[{ x: 1, y: 0 }], [{ x: 1, y: 10 }], [{ x: -1, y: 0 }]]);
    expect(handle.emitted('keep')).toHaveLength(2);
  });

  it('with one axis obeys all four arrows, and leaves keys with Ctrl to others', async () => {
    const handle = make({ axis: 'y' });
    await handle.trigger('keydown', { key: 'ArrowRight' });
    await handle.trigger('keydown', { key: 'ArrowDown' });
    await handle.trigger('keydown', { key: 'ArrowUp', ctrlKey: true });
    expect(handle.emitted('steps')).toEqual([[{ x: 0, y: 1 }], [{ x: 0, y: 0 }]]);
  });

  it('does nothing while disabled', async () => {
    const handle = make({ disabled: true });
    await handle.trigger('pointerdown', at(0, 0));
    await handle.trigger('pointermove', at(40, 0));
    await handle.trigger('keydown', { key: 'ArrowRight' });
    expect(handle.emitted()).not.toHaveProperty('drag');
    expect(handle.emitted()).not.toHaveProperty('steps');
    expect(handle.attributes('tabindex')).toBe('-1');
  });
});

describe('a hold', () => {
  it('keeps the state it was taken with until it is let go', () => {
    const hold = useHold<number>();
    expect(hold.take(() => 1)).toBe(1);
    expect(hold.take(() => 2)).toBe(1);
    hold.letGo();
    expect(hold.held.value).toBeNull();
    expect(hold.take(() => 3)).toBe(3);
  });
});

describe('writing into the page', () => {
  it('changes the text in place, and moves without a thought for elements that are gone', () => {
    const element = document.createElement('b');
    writeText(element, 'one');
    const node = element.firstChild;
    writeText(element, 'two');
    expect(element.firstChild).toBe(node);
    expect(element.textContent).toBe('two');
    moveTo(element, 3, 4);
    expect(element.style.transform).toBe('translate(3px, 4px)');
    moveTo(null, 1, 1);
    writeText(undefined, 'x');
  });
});
