/** What a table is made of: rows of cells, each knowing what it shows and which command an edit of it is. */
import type { Command, Entered } from '../../commands';
import type { Path } from '../../../solver/model';
import type { UnitSystem } from '../../../solver/model/quantities';
import { shownNumber, type QuantitySpec } from '../readEntered';
import type { SignKind } from '../words';

interface Common {
  /** Path in the document of what the cell shows, so that a problem finds it. */
  path?: Path;
  /** Said in grey after the value. */
  note?: string;
}

export interface TextCell extends Common {
  kind: 'text';
  text: string;
  /** Colour of a swatch before the text. */
  swatch?: string;
  /** What an empty text is shown as. */
  placeholder?: string;
  /** Why a text cannot be taken; null when it can. */
  refuse?: (text: string) => string | null;
  edit: (text: string) => Command;
}

export interface QuantityCell extends Common {
  kind: 'quantity';
  spec: QuantitySpec;
  /** In the stored unit; null shows an empty cell. */
  value: number | null;
  typed?: string;
  /** Before the number: "≥". */
  prefix?: string;
  edit: (entered: Entered) => Command;
}

export interface ChoiceCell extends Common {
  kind: 'choice';
  value: string;
  options: readonly { value: string; label: string }[];
  /** The command of a choice; null where choosing does something else, which is then done by itself. */
  edit: (value: string) => Command | null;
}

/** Only to read. */
export interface ShownCell extends Common {
  kind: 'shown';
  text: string;
  unit?: string;
  muted?: boolean;
  sign?: SignKind;
  /** What Enter and a click do, if anything. */
  act?: () => void;
}

export type Cell = TextCell | QuantityCell | ChoiceCell | ShownCell;

/** An entry of a row's menu. */
export interface RowAction {
  label: string;
  keys?: string;
  /** Makes an edit, or does something else. */
  command?: () => Command;
  act?: () => void;
  disabled?: boolean;
}

export interface Row {
  id: string;
  /** Spoken of by this name: "Shell". */
  label: string;
  cells: readonly Cell[];
  /** Insert after, duplicate, move, remove: those that the table offers. */
  insert?: () => Command;
  duplicate?: () => Command;
  move?: (by: number) => Command;
  /** null: this row cannot be removed, and `removeRefusal` says why. */
  remove?: (() => Command) | null;
  removeRefusal?: string;
  more?: readonly RowAction[];
}

export interface Column {
  head: string;
  /** CSS width; the last column that has none takes what is left. */
  width?: string;
  align?: 'right';
}

/** The text of a cell as it is copied. */
export function cellText(cell: Cell, system: UnitSystem): string {
  switch (cell.kind) {
    case 'text':
      return cell.text || (cell.placeholder ?? '');
    case 'quantity':
      return `${cell.prefix ? `${cell.prefix} ` : ''}${shownNumber(cell.value, cell.spec, system).text}`;
    case 'choice':
      return cell.options.find((option) => option.value === cell.value)?.label ?? '';
    case 'shown':
      return cell.unit === undefined ? cell.text : `${cell.text} ${cell.unit}`;
  }
}

/** Whether Enter and typing begin an edit. */
export const isEditable = (cell: Cell | undefined): boolean => cell !== undefined && cell.kind !== 'shown';
