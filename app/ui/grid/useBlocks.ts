/** Copy and paste of a table: out with heads and units, in with a preview of what does not fit. */
import { shallowRef, type ShallowRef } from 'vue';
import type { Command } from '../../commands';
import { htmlBlock, parseBlock, planPaste, writeBlock, type PastePlan, type PasteTarget } from './block';

export interface Blocks {
  /** The paste that waits for a yes. */
  plan: ShallowRef<PastePlan | null>;
  copy(event: ClipboardEvent): void;
  paste(event: ClipboardEvent): void;
  accept(): void;
  cancel(): void;
}

export interface BlocksOptions {
  /** Heads, then rows. */
  texts: () => string[][];
  target: () => PasteTarget;
  /** A field of the table is being edited: copy and paste are its own. */
  busy: () => boolean;
  commit: (command: Command) => void;
  say: (note: string) => void;
  done: () => void;
}

export function useBlocks({ texts, target, busy, commit, say, done }: BlocksOptions): Blocks {
  const plan = shallowRef<PastePlan | null>(null);
  const end = (): void => {
    plan.value = null;
    done();
  };
  return {
    plan,
    copy(event) {
      if (busy() || !window.getSelection()?.isCollapsed || event.clipboardData === null) return;
      event.preventDefault();
      const block = texts();
      event.clipboardData.setData('text/plain', writeBlock(block));
      event.clipboardData.setData('text/html', htmlBlock(block));
      say(block.length === 2 ? '1 row copied' : `${block.length - 1} rows copied`);
    },
    paste(event) {
      const text = event.clipboardData?.getData('text/plain') ?? '';
      if (busy() || text.trim() === '') return;
      event.preventDefault();
      const planned = planPaste(parseBlock(text), target());
      if (planned.refused.length === 0 && planned.rows === 1 && planned.columns === 1) commit(planned.command);
      else plan.value = planned;
    },
    accept() {
      if (plan.value !== null && plan.value.fits > 0) commit(plan.value.command);
      end();
    },
    cancel: end,
  };
}
