/** How series are told apart: colour, dash and letter together, in one fixed order. */

export interface SeriesStyle {
  letter: string;
  /** Custom property that holds the colour. */
  colour: string;
  /** Dash pattern, px; empty is solid. */
  dash: readonly number[];
}

const COLOURS = 8;
const DASHES: readonly (readonly number[])[] = [[], [8, 3], [8, 3, 2, 3], [3, 2.5], [12, 3, 2, 3, 2, 3], [1.5, 2.5]];

/** Style of the nth series from 0: letters A to Z, then AA, AB; eight colours over six dashes. */
export function seriesStyle(index: number): SeriesStyle {
  const letter = String.fromCharCode(65 + (index % 26));
  return {
    letter: index < 26 ? letter : String.fromCharCode(64 + Math.floor(index / 26)) + letter,
    colour: `--c${(index % COLOURS) + 1}`,
    dash: DASHES[index % DASHES.length],
  };
}
