/** What keys do while the timeline has the focus. */

export type TimelineAction =
  'play' | 'frameBack' | 'frameOn' | 'eventBack' | 'eventOn' | 'start' | 'end' | 'zoomIn' | 'zoomOut' | 'whole' | 'stage';

type Key = Pick<KeyboardEvent, 'key' | 'shiftKey' | 'ctrlKey' | 'altKey' | 'metaKey'>;

/** The action of a key, or null: a key with Ctrl, Alt or Meta belongs to someone else. */
export function actionOf({ key, shiftKey, ctrlKey, altKey, metaKey }: Key): TimelineAction | null {
  if (ctrlKey || altKey || metaKey) return null;
  switch (key) {
    case ' ':
      return 'play';
    case 'ArrowLeft':
      return shiftKey ? 'eventBack' : 'frameBack';
    case 'ArrowRight':
      return shiftKey ? 'eventOn' : 'frameOn';
    case 'Home':
      return 'start';
    case 'End':
      return 'end';
    case '+':
    case '=':
      return 'zoomIn';
    case '-':
    case '−':
      return 'zoomOut';
    case '0':
      return 'whole';
    default:
      return null;
  }
}
