/** Blocks of cells to and from a spreadsheet. */
import { together, type Command } from '../../commands';
import type { Project } from '../../../solver/model';
import type { UnitSystem } from '../../../solver/model/quantities';
import { readEntered } from '../readEntered';
import type { Cell, Row } from './cells';

/** Rows of cells of tab-separated text; quoted cells may hold tabs and line ends. */
export function parseBlock(text: string): string[][] {
  const rows: string[][] = [];
  const body = text.replace(/\r\n?/g, '\n').replace(/\n$/, '');
  const token = /(?:"((?:[^"]|"")*)"|([^\t\n]*))(\t|\n|$)/y;
  let row: string[] = [];
  while (token.lastIndex <= body.length) {
    const found = token.exec(body);
    if (found === null) return body.split('\n').map((line) => line.split('\t'));
    row.push((found[1]?.replaceAll('""', '"') ?? found[2]).trim());
    if (found[3] !== '\t') {
      rows.push(row);
      row = [];
    }
    if (found[3] === '') break;
  }
  return rows;
}

/** Tab-separated text; a cell with tabs, quotes or line ends is quoted. Minus signs are plain, so that numbers stay numbers. */
export const writeBlock = (rows: readonly (readonly string[])[]): string =>
  rows.map((row) => row.map((cell) => quoted(cell.replaceAll('−', '-'))).join('\t')).join('\n');

const quoted = (cell: string): string => (/["\t\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell);

/** The same rows as a table of a web page. */
export function htmlBlock(rows: readonly (readonly string[])[]): string {
  const safe = (cell: string): string => cell.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');
  const line = (row: readonly string[], tag: string): string =>
    `<tr>${row.map((cell) => `<${tag}>${safe(cell)}</${tag}>`).join('')}</tr>`;
  return `<table>${rows.map((row, index) => line(row, index === 0 ? 'th' : 'td')).join('')}</table>`;
}

export interface PasteRefusal {
  /** From 1, as the person counts the rows of the block. */
  row: number;
  column: string;
  text: string;
  why: string;
}

/** What pasting would do, before it is done. */
export interface PastePlan {
  rows: number;
  columns: number;
  fits: number;
  refused: PasteRefusal[];
  /** All that fits, as one edit. */
  command: Command;
}

export interface PasteTarget {
  project: Project;
  rowsOf: (project: Project) => readonly Row[];
  heads: readonly string[];
  /** Adds a row at the end, for blocks longer than the table; absent: such cells are refused. */
  grow?: (project: Project) => Command;
  at: { row: number; column: number };
  system: UnitSystem;
}

/** Works out what a block pasted at a cell would change. Empty cells of the block leave theirs as they are. */
export function planPaste(block: readonly (readonly string[])[], target: PasteTarget): PastePlan {
  const commands: Command[] = [];
  const refused: PasteRefusal[] = [];
  let fits = 0;
  let project = target.project;
  const take = (command: Command): void => {
    commands.push(command);
    project = command.apply(project);
  };
  block.forEach((texts, index) => {
    if (target.grow !== undefined && target.at.row + index >= target.rowsOf(project).length) take(target.grow(project));
    texts.forEach((text, offset) => {
      if (text === '') return;
      const column = target.at.column + offset;
      const cell = target.rowsOf(project)[target.at.row + index]?.cells[column];
      const outcome = cell === undefined ? 'There is no such cell.' : pasted(cell, text, target.system);
      if (typeof outcome === 'string') {
        refused.push({ row: index + 1, column: target.heads[column] ?? `column ${column + 1}`, text, why: outcome });
      } else {
        fits++;
        take(outcome);
      }
    });
  });
  const columns = Math.max(0, ...block.map((row) => row.length));
  const name = `Paste ${fits === 1 ? '1 cell' : `${fits} cells`}`;
  return { rows: block.length, columns, fits, refused, command: together(name, commands) };
}

/** The edit that a pasted text is in a cell, or why it is none. */
function pasted(cell: Cell, text: string, system: UnitSystem): Command | string {
  switch (cell.kind) {
    case 'shown':
      return 'This cell is computed.';
    case 'text':
      return cell.refuse?.(text) ?? cell.edit(text);
    case 'choice': {
      const wanted = text.toLowerCase();
      const option = cell.options.find(({ label, value }) => label.toLowerCase() === wanted || value.toLowerCase() === wanted);
      return (option && cell.edit(option.value)) ?? 'This is not one of the choices.';
    }
    case 'quantity': {
      const reading = readEntered(text.replace(/^[≥≤] ?/, ''), cell.spec, system);
      if (reading.state === 'value') return cell.edit(reading.entered);
      if (reading.state === 'choice') return `This can be read as ${reading.choices.map((choice) => choice.text).join(' or ')}.`;
      return reading.state === 'partial' ? reading.hint : reading.message;
    }
  }
}
