/** Colour maps: a value between 0 and 1 to a colour, and strips of colour along a line. */
import { CIVIDIS, DIFFERENCE } from './colourTables';

const ROWS = 256;

/** 256 rows of red, green, blue, 0 to 255. */
export interface ColourMap {
  readonly name: 'cividis' | 'difference';
  readonly rows: Uint8Array;
}

function unpack(name: ColourMap['name'], packed: string): ColourMap {
  const rows = new Uint8Array(ROWS * 3);
  for (let i = 0; i < rows.length; i++) rows[i] = Number.parseInt(packed.slice(2 * i, 2 * i + 2), 16);
  return { name, rows };
}

/** For temperatures: monotone in grey, safe for colour-vision deficiency. */
export const cividis = unpack('cividis', CIVIDIS);
/** For signed quantities: zero belongs in the middle. */
export const difference = unpack('difference', DIFFERENCE);

/** Row of a value between `low` and `high`; outside values take the end rows, a missing range the first one. */
function rowOf(value: number, low: number, high: number): number {
  if (!(high > low)) return 0;
  const row = Math.round(((value - low) / (high - low)) * (ROWS - 1));
  return Math.min(ROWS - 1, Math.max(0, row));
}

/** The colour of a value between `low` and `high`, as "rgb(r g b)". */
export function colourOf(map: ColourMap, value: number, low: number, high: number): string {
  const row = 3 * rowOf(value, low, high);
  return `rgb(${map.rows[row]} ${map.rows[row + 1]} ${map.rows[row + 2]})`;
}

/** Writes the colours of `values` between `low` and `high` into `out`, four bytes each (red, green, blue, opaque). */
export function paintRow(map: ColourMap, values: ArrayLike<number>, low: number, high: number, out: Uint8ClampedArray): void {
  for (let i = 0; i < values.length; i++) {
    const row = 3 * rowOf(values[i], low, high);
    out[4 * i] = map.rows[row];
    out[4 * i + 1] = map.rows[row + 1];
    out[4 * i + 2] = map.rows[row + 2];
    out[4 * i + 3] = 255;
  }
}

/** A CSS gradient from the low to the high end of the map. */
export function gradientOf(map: ColourMap, stops = 9): string {
  const colours = Array.from({ length: stops }, (_, i) => colourOf(map, i, 0, stops - 1));
  return `linear-gradient(90deg, ${colours.join(', ')})`;
}
