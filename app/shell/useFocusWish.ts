/** Takes the focus to the field of a place in the plan: opens its table, chooses its stage or requirement, finds the field. */
import { nextTick, watch } from 'vue';
import { useProjectStore, useViewStore, type TableName } from '../stores';
import { parsePlace } from '../commands';

/** The table that holds a place of the document. */
export function tableOf(place: string): TableName | null {
  const [first, second, , third] = parsePlace(place);
  switch (first) {
    case 'part':
      return second === 'faces' ? 'exposure' : 'part';
    case 'initial':
      return 'part';
    case 'materials':
    case 'probes':
    case 'requirements':
      return first;
    case 'cycle':
      return third === 'exposures' ? 'exposure' : 'cycle';
    case 'settings':
      return 'solver';
    case 'notes':
      return 'notes';
    default:
      return null;
  }
}

/** The element whose place says most of the place wished for; null where none has its first key. */
export function fieldOf(place: string, root: ParentNode): HTMLElement | null {
  const wanted = parsePlace(place);
  let best: HTMLElement | null = null;
  let most = 0;
  for (const element of root.querySelectorAll<HTMLElement>('[data-place]')) {
    const keys = parsePlace(element.dataset['place'] ?? '');
    let shared = 0;
    while (shared < wanted.length && keys[shared] === wanted[shared]) shared++;
    if (shared > most) [best, most] = [element, shared];
  }
  return best;
}

export function useFocusWish(root: () => ParentNode | null): void {
  const project = useProjectStore();
  const view = useViewStore();
  watch(
    () => view.focusWish,
    async (wish) => {
      if (wish === null) return;
      const table = tableOf(wish.place);
      if (table !== null) view.setOpen(table, true);
      const [list, second, index] = parsePlace(wish.place);
      if (list === 'cycle' && typeof index === 'number') view.selectedStage = project.current.cycle.stages[index]?.id ?? null;
      if (list === 'requirements' && typeof second === 'number') {
        view.selectedRequirement = project.current.requirements[second]?.id ?? null;
      }
      await nextTick();
      await nextTick();
      const field = fieldOf(wish.place, root() ?? document);
      field?.focus();
      field?.scrollIntoView?.({ block: 'nearest' });
    },
  );
}
