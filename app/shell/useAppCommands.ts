/** The app's commands by name: from keys, from the bar, and from the system's menu. */
import { onBeforeUnmount, onMounted, onScopeDispose } from 'vue';
import type { Host } from '../bridge';
import { useProjectStore, useRunStore, useViewStore } from '../stores';
import { commandOf, type CommandName } from './shortcuts';
import type { Desk } from './useDesk';
import { goToPanel } from './usePanels';

export function useAppCommands(host: Host, desk: Desk, showShortcuts: () => void): { doCommand: (name: CommandName) => void } {
  const project = useProjectStore();
  const run = useRunStore();
  const view = useViewStore();

  const commands: Record<CommandName, () => void> = {
    new: () => void desk.newPlan(),
    open: () => void desk.openFile(),
    save: () => void (desk.screen.value === 'plan' && desk.save()),
    'save-as': () => void (desk.screen.value === 'plan' && desk.saveAs()),
    undo: () => project.undo(),
    redo: () => project.redo(),
    start: () => (desk.screen.value = 'start'),
    plan: () => (desk.screen.value = 'plan'),
    'units-si': () => (view.units = 'SI'),
    'units-us': () => (view.units = 'US'),
    'theme-system': () => (view.theme = 'system'),
    'theme-light': () => (view.theme = 'light'),
    'theme-dark': () => (view.theme = 'dark'),
    'theme-contrast': () => (view.theme = 'contrast'),
    play: () => (view.playing = !view.playing),
    'cancel-run': () => run.cancel(),
    shortcuts: showShortcuts,
    'next-panel': () => goToPanel(1),
    'previous-panel': () => goToPanel(-1),
  };

  function onKey(event: KeyboardEvent): void {
    if (event.defaultPrevented || desk.question.value !== null) return;
    if (event.key === 'Escape') {
      if (run.state === 'solving') run.cancel();
      return;
    }
    const { key, code, altKey: alt, shiftKey: shift } = event;
    const name = commandOf({ key, code, ctrl: event.ctrlKey || event.metaKey, alt, shift }, host.viewModifier);
    if (name === null || ((name === 'undo' || name === 'redo') && isTyping(event.target))) return;
    event.preventDefault();
    commands[name]();
  }

  onMounted(() => window.addEventListener('keydown', onKey));
  onBeforeUnmount(() => window.removeEventListener('keydown', onKey));
  onScopeDispose(
    host.onMenuCommand((name) => {
      if (Object.hasOwn(commands, name)) commands[name as CommandName]();
    }),
  );

  return { doCommand: (name) => commands[name]() };
}

/** Undo belongs to a text as long as it holds something that is not in the plan yet. */
const isTyping = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement && target.matches('[data-touched], textarea, .title-input');
