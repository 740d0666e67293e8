/** Text in columns, for a terminal or a file: no borders, two spaces between columns. */

export type Align = 'left' | 'right';

/** A cell; `paint` colours it after its width was taken. */
export interface Cell {
  text: string;
  paint?: (text: string) => string;
}

/** Rows of one shape as lines; trailing blanks are dropped. Widths count code points, which is what our signs need. */
export function columns(rows: readonly (readonly (string | Cell)[])[], aligns: readonly Align[], indent = '  '): string {
  const cells = rows.map((row) => row.map((cell) => (typeof cell === 'string' ? { text: cell } : cell)));
  const widths = aligns.map((_, column) => Math.max(0, ...cells.map((row) => widthOf(row[column].text))));
  const line = (row: readonly Cell[]): string => {
    const parts = row.map(({ text, paint = (same) => same }, column) => {
      const blanks = ' '.repeat(widths[column] - widthOf(text));
      return aligns[column] === 'left' ? paint(text) + blanks : blanks + paint(text);
    });
    return (indent + parts.join('  ')).trimEnd();
  };
  return cells.map((row) => `${line(row)}\n`).join('');
}

const widthOf = (text: string): number => [...text].length;

/** A heading and what stands under it; nothing where there is nothing. */
export const block = (heading: string, body: string): string => (body === '' ? '' : `\n${heading}\n${body}`);
