/** The editing of one quantity: the text, what it reads as, and when it is tried, kept or dropped. */
import { computed, ref, watch, type Ref } from 'vue';
import type { Entered } from '../commands';
import type { UnitSystem } from '../../solver/model/quantities';
import { readEntered, shownNumber, type FieldReading, type QuantitySpec } from './readEntered';

export interface QuantityInputOptions {
  spec: () => QuantitySpec;
  system: () => UnitSystem;
  /** The number in the plan; null where there is none yet. */
  value: () => number | null;
  /** What was typed for it, if kept. */
  typed: () => string | undefined;
  /** Shows what the number would do; null takes that back. */
  draft: (entered: Entered | null) => void;
  commit: (entered: Entered) => void;
}

export interface QuantityInput {
  text: Ref<string>;
  reading: Ref<FieldReading | null>;
  /** Text of the number in the plan, as the field shows it when nobody edits. */
  shown: Ref<string>;
  /** The text differs from what was there when editing began. */
  touched: Ref<boolean>;
  begin(replaceWith?: string): void;
  type(text: string): void;
  choose(entered: Entered): void;
  /** Enter or leaving: keeps a number that was understood. False when the text is refused or unfinished and stays. */
  keep(): boolean;
  /** Esc: back to the number in the plan. */
  restore(): void;
}

export function useQuantityInput(options: QuantityInputOptions): QuantityInput {
  const text = ref('');
  const initial = ref('');
  const editing = ref(false);

  const shown = computed(() => shownNumber(options.value(), options.spec(), options.system()).text);
  const touched = computed(() => editing.value && text.value !== initial.value);
  const reading = computed(() => (touched.value ? readEntered(text.value, options.spec(), options.system()) : null));

  function begin(replaceWith?: string): void {
    initial.value = options.typed() ?? shown.value;
    editing.value = true;
    if (replaceWith === undefined) text.value = initial.value;
    else type(replaceWith);
  }

  function type(next: string): void {
    text.value = next;
    const read = reading.value;
    options.draft(read?.state === 'value' ? read.entered : null);
  }

  function choose(entered: Entered): void {
    editing.value = false;
    options.commit(entered);
  }

  function keep(): boolean {
    const read = reading.value;
    if (read === null || (read.state === 'partial' && text.value.trim() === '')) {
      restore();
      return true;
    }
    if (read.state !== 'value') {
      options.draft(null);
      return false;
    }
    choose(read.entered);
    return true;
  }

  function restore(): void {
    editing.value = false;
    text.value = shown.value;
    options.draft(null);
  }

  // Undo, or another set of units, while the cursor stands in a field that was not typed in.
  watch(shown, () => {
    if (editing.value && !touched.value) begin();
  });

  return { text, reading, shown, touched, begin, type, choose, keep, restore };
}
