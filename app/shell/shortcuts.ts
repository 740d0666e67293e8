/** Keys and the commands they stand for. Keys of a table, a handle or the time axis live with those. */

/** Names of the app's commands, the same as in the system's menu. */
export type CommandName =
  | 'new'
  | 'open'
  | 'save'
  | 'save-as'
  | 'undo'
  | 'redo'
  | 'start'
  | 'plan'
  | 'units-si'
  | 'units-us'
  | 'theme-system'
  | 'theme-light'
  | 'theme-dark'
  | 'theme-contrast'
  | 'play'
  | 'cancel-run'
  | 'shortcuts'
  | 'next-panel'
  | 'previous-panel';

export type Modifier = 'Ctrl' | 'Alt';

export interface KeyPress {
  key: string;
  code: string;
  ctrl: boolean;
  alt: boolean;
  shift: boolean;
}

/** The command that a key stands for here; in a browser Alt does what Ctrl cannot, for the browser keeps some of its keys. */
export function commandOf(press: KeyPress, modifier: Modifier): CommandName | null {
  if (press.key === 'F1') return 'shortcuts';
  if (press.key === 'F6') return press.shift ? 'previous-panel' : 'next-panel';
  const letter = press.code.startsWith('Key') ? press.code.slice(3) : press.code.replace('Digit', '');
  if (press.alt && !press.ctrl && modifier === 'Alt')
    return ({ N: 'new', 1: 'plan', 2: 'start' }[letter] as CommandName | null) ?? null;
  if (!press.ctrl || press.alt) return null;
  switch (letter) {
    case 'Z':
      return press.shift ? 'redo' : 'undo';
    case 'Y':
      return 'redo';
    case 'N':
      return 'new';
    case 'O':
      return 'open';
    case 'S':
      return press.shift ? 'save-as' : 'save';
    case '1':
      return 'plan';
    case '2':
      return 'start';
    default:
      return null;
  }
}

/** The key that a command is named with here. */
export function keysOf(command: CommandName, modifier: Modifier): string {
  const KEYS: Partial<Record<CommandName, string>> = {
    new: `${modifier} N`,
    open: 'Ctrl O',
    save: 'Ctrl S',
    'save-as': 'Shift Ctrl S',
    undo: 'Ctrl Z',
    redo: 'Ctrl Y',
    plan: `${modifier} 1`,
    start: `${modifier} 2`,
    shortcuts: 'F1',
    'next-panel': 'F6',
    'previous-panel': 'Shift F6',
  };
  return KEYS[command] ?? '';
}

/** The list of F1, by place. */
export const shortcutList = (modifier: Modifier): readonly { place: string; keys: readonly (readonly [string, string])[] }[] => [
  {
    place: 'Everywhere',
    keys: [
      ['Ctrl Z', 'undo'],
      ['Ctrl Y, Shift Ctrl Z', 'redo'],
      [`${modifier} N`, 'new plan'],
      ['Ctrl O', 'open a plan'],
      ['Ctrl S', 'save'],
      ['Shift Ctrl S', 'save as'],
      [`${modifier} 1, ${modifier} 2`, 'plan, start'],
      ['F6, Shift F6', 'next, previous panel'],
      ['Esc', 'close the topmost thing, then cancel the run'],
      ['F1', 'this list'],
    ],
  },
  {
    place: 'In a table',
    keys: [
      ['arrows, Home, End', 'move'],
      ['Enter, F2, or typing', 'edit'],
      ['Enter', 'keep'],
      ['Esc', 'restore'],
      ['Tab', 'keep and go on'],
      ['Insert', 'add a row after this one'],
      ['Delete', 'remove the row'],
      ['Alt ↑, Alt ↓', 'move the row'],
      ['Ctrl D', 'duplicate the row'],
      ['Shift F10', 'what can be done with the row'],
      ['Ctrl C', 'copy the table, with heads and units'],
      ['Ctrl V', 'paste a block of cells'],
    ],
  },
  {
    place: 'On the time axis',
    keys: [
      ['Space', 'play, pause'],
      ['←, →', 'a frame back, on'],
      ['Shift ←, Shift →', 'the event before, after'],
      ['Home, End', 'start, end'],
      ['+, −', 'zoom at the playhead'],
      ['0', 'the whole cycle'],
    ],
  },
  {
    place: 'On a handle, an edge or a probe',
    keys: [
      ['arrows', 'a step'],
      ['Shift and arrows', 'ten steps'],
      ['Enter', 'keep'],
      ['Esc', 'put back'],
    ],
  },
];
