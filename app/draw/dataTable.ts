/** A chart's figures as a table: for screen readers, the clipboard and files. */

export interface DataTable {
  /** What the table shows, in a few words. */
  caption: string;
  /** Heads with units. */
  columns: string[];
  rows: (string | number | null)[][];
}

/** Tab-separated text with heads, for pasting into a sheet; a gap is an empty cell. Numbers keep up to seven digits. */
export function tabSeparated({ columns, rows }: DataTable): string {
  const cell = (value: string | number | null): string => {
    if (value === null || (typeof value === 'number' && !Number.isFinite(value))) return '';
    if (typeof value === 'number') return String(Number(value.toPrecision(7)));
    return value.replace(/[\t\r\n]+/g, ' ');
  };
  return [columns, ...rows].map((row) => row.map(cell).join('\t')).join('\n') + '\n';
}
