/** The one tab stop of a table: which cell has it, which one is edited, and what was typed that could not be taken. */
import { computed, nextTick, ref, type ComputedRef, type Ref } from 'vue';
import { isEditable, type Cell, type Row } from './cells';
import { moveBy, nextCell, type Place } from './moves';

export interface Grid {
  /** The cell that has the tab stop. */
  cursor: ComputedRef<Place>;
  editing: Ref<{ row: string; column: number; startWith?: string } | null>;
  isEditing(row: Row, column: number): boolean;
  /** Texts that were refused, by cell: nothing typed is lost. */
  refusedText(row: Row, column: number): string | undefined;
  setRefused(row: string, column: number, text: string | null): void;
  /** Puts the tab stop on a cell that has the focus already. */
  take(place: Place): void;
  /** Puts the tab stop and the focus on a cell. */
  goTo(place: Place): void;
  /** Moves by an arrow or the like; false for other keys. */
  moveByKey(key: string, ctrl: boolean): boolean;
  edit(place: Place, startWith?: string): boolean;
  endEdit(): void;
  /** To the next or previous cell that can be edited. */
  goOn(from: Place, by: 1 | -1): void;
}

export function useGrid(rows: () => readonly Row[], columns: () => number, table: Ref<HTMLElement | null>): Grid {
  const at = ref<{ row: string; index: number; column: number }>({ row: '', index: 0, column: 0 });
  const editing = ref<{ row: string; column: number; startWith?: string } | null>(null);
  const refused = ref(new Map<string, string>());
  const keyOf = (row: string, column: number): string => `${row} ${column}`;

  // The row is followed by its id; when it is gone, the one at its place takes over.
  const cursor = computed<Place>(() => {
    const found = rows().findIndex((row) => row.id === at.value.row);
    const row = found >= 0 ? found : Math.min(at.value.index, rows().length - 1);
    return { row: Math.max(0, row), column: Math.min(at.value.column, columns() - 1) };
  });

  const cellAt = (place: Place): Cell | undefined => rows()[place.row]?.cells[place.column];

  function take(place: Place): void {
    at.value = { row: rows()[place.row]?.id ?? '', index: place.row, column: place.column };
  }

  function goTo(place: Place): void {
    take(place);
    void nextTick(() => {
      const cell = table.value?.querySelector<HTMLElement>(`[data-row="${place.row}"][data-column="${place.column}"]`);
      cell?.focus();
      cell?.scrollIntoView?.({ block: 'nearest', inline: 'nearest' });
    });
  }

  return {
    cursor,
    editing,
    isEditing: (row, column) => editing.value?.row === row.id && editing.value.column === column,
    refusedText: (row, column) => refused.value.get(keyOf(row.id, column)),
    setRefused(row, column, text) {
      if (text === null) refused.value.delete(keyOf(row, column));
      else refused.value.set(keyOf(row, column), text);
    },
    take,
    goTo,
    moveByKey(key, ctrl) {
      const to = moveBy(key, ctrl, cursor.value, rows().length, columns());
      if (to !== null) goTo(to);
      return to !== null;
    },
    edit(place, startWith) {
      const row = rows()[place.row];
      if (row === undefined || !isEditable(row.cells[place.column])) return false;
      take(place);
      const kept = refused.value.get(keyOf(row.id, place.column));
      editing.value = { row: row.id, column: place.column, startWith: startWith ?? kept };
      return true;
    },
    endEdit: () => void (editing.value = null),
    goOn(from, by) {
      goTo(nextCell(from, by, rows().length, columns(), (place) => isEditable(cellAt(place))) ?? from);
    },
  };
}
