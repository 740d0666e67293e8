/** Where the arrow keys lead in a table. */

export interface Place {
  row: number;
  column: number;
}

/** The cell that a key leads to, kept inside the table; null for a key that does not move. */
export function moveBy(key: string, ctrl: boolean, at: Place, rows: number, columns: number): Place | null {
  const last = { row: rows - 1, column: columns - 1 };
  const inside = ({ row, column }: Place): Place => ({
    row: Math.min(Math.max(row, 0), last.row),
    column: Math.min(Math.max(column, 0), last.column),
  });
  switch (key) {
    case 'ArrowUp':
      return inside({ row: at.row - 1, column: at.column });
    case 'ArrowDown':
      return inside({ row: at.row + 1, column: at.column });
    case 'ArrowLeft':
      return inside({ row: at.row, column: at.column - 1 });
    case 'ArrowRight':
      return inside({ row: at.row, column: at.column + 1 });
    case 'Home':
      return { row: ctrl ? 0 : at.row, column: 0 };
    case 'End':
      return { row: ctrl ? last.row : at.row, column: last.column };
    case 'PageUp':
      return { row: 0, column: at.column };
    case 'PageDown':
      return { row: last.row, column: at.column };
    default:
      return null;
  }
}

/** The next cell in reading order for which `wanted` holds, forwards or backwards; null at the ends. */
export function nextCell(at: Place, by: 1 | -1, rows: number, columns: number, wanted: (place: Place) => boolean): Place | null {
  for (let index = at.row * columns + at.column + by; index >= 0 && index < rows * columns; index += by) {
    const place = { row: Math.floor(index / columns), column: index % columns };
    if (wanted(place)) return place;
  }
  return null;
}
