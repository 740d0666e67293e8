import { describe, expect, it } from 'vitest';
import { commandOf, keysOf, type KeyPress } from '../../../app/shell/shortcuts';

const press = (key: string, more: Partial<KeyPress> = {}): KeyPress => ({
  key,
  code: /^\d$/.test(key) ? `Digit${key}` : `Key${key.toUpperCase()}`,
  ctrl: false,
  alt: false,
  shift: false,
  ...more,
});

describe('keys', () => {
  it('stand for the commands of the list', () => {
    const ctrl = { ctrl: true };
    const names = ['z', 'y', 'n', 'o', 's', '1', '2'].map((key) => commandOf(press(key, ctrl), 'Ctrl'));
    expect(names).toEqual(['undo', 'redo', 'new', 'open', 'save', 'plan', 'start']);
    expect(commandOf(press('z', { ctrl: true, shift: true }), 'Ctrl')).toBe('redo');
    expect(commandOf(press('s', { ctrl: true, shift: true }), 'Ctrl')).toBe('save-as');
    expect(commandOf(press('F6', { shift: true }), 'Ctrl')).toBe('previous-panel');
  });

  it('without a modifier are letters', () => expect(commandOf(press('n'), 'Ctrl')).toBeNull());

  it('in a browser use Alt where the browser keeps Ctrl', () => {
    expect(commandOf(press('n', { alt: true }), 'Alt')).toBe('new');
    expect(commandOf(press('1', { alt: true }), 'Alt')).toBe('plan');
    expect(commandOf(press('n', { alt: true }), 'Ctrl')).toBeNull();
    expect([keysOf('new', 'Alt'), keysOf('new', 'Ctrl')]).toEqual(['Alt N', 'Ctrl N']);
  });
});
