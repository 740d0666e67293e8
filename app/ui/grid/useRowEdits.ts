/** Edits of whole rows: add, duplicate, move, remove; the cursor goes where the edit led. */
import { nextTick, type Ref } from 'vue';
import type { Command } from '../../commands';
import type { Row } from './cells';
import type { Grid } from './useGrid';

export interface RowEdits {
  add(command: Command): void;
  insert(row: Row): void;
  duplicate(row: Row): void;
  move(row: Row, by: number): void;
  remove(row: Row): void;
  /** An entry of the row's own menu. */
  act(row: Row, index: number): void;
  /** Does what a key stands for on a row; false for other keys. */
  byKey(event: KeyboardEvent, row: Row): boolean;
}

export interface RowEditsOptions {
  rows: () => readonly Row[];
  grid: Grid;
  selected: Ref<string | null>;
  commit: (command: Command) => void;
  /** Says why something was not done. */
  say: (note: string) => void;
  openMenu: (row: Row) => void;
}

export function useRowEdits({ rows, grid, selected, commit, say, openMenu }: RowEditsOptions): RowEdits {
  function make(command: Command, to: () => number, column = 0): void {
    commit(command);
    void nextTick(() => {
      const row = to();
      if (rows()[row] === undefined) return;
      grid.goTo({ row, column });
      selected.value = rows()[row].id;
    });
  }

  function insert(row: Row): void {
    const index = rows().indexOf(row);
    if (row.insert) make(row.insert(), () => index + 1);
  }

  function duplicate(row: Row): void {
    const index = rows().indexOf(row);
    if (row.duplicate) make(row.duplicate(), () => index + 1);
  }

  function move(row: Row, by: number): void {
    const to = rows().indexOf(row) + by;
    if (row.move && to >= 0 && to < rows().length) make(row.move(by), () => to, grid.cursor.value.column);
  }

  function remove(row: Row): void {
    const index = rows().indexOf(row);
    if (row.remove) make(row.remove(), () => Math.min(index, rows().length - 1), grid.cursor.value.column);
    else if (row.removeRefusal) say(row.removeRefusal);
  }

  return {
    add: (command) => make(command, () => rows().length - 1),
    insert,
    duplicate,
    move,
    remove,
    act(row, index) {
      const action = row.more?.[index];
      if (action?.command) commit(action.command());
      action?.act?.();
    },
    byKey(event, row) {
      const ctrl = event.ctrlKey || event.metaKey;
      if (event.altKey && (event.key === 'ArrowUp' || event.key === 'ArrowDown')) move(row, event.key === 'ArrowUp' ? -1 : 1);
      else if (event.key === 'Insert' && row.insert) insert(row);
      else if (event.key === 'Delete' && row.remove !== undefined) remove(row);
      else if (ctrl && event.key.toLowerCase() === 'd' && row.duplicate) duplicate(row);
      else if (event.key === 'ContextMenu' || (event.shiftKey && event.key === 'F10')) openMenu(row);
      else return false;
      return true;
    },
  };
}
