/** Grids of a layered part: where the unknowns sit. No physics beyond what chooses their number. */
import { FLAT, type Shape } from './shape';

/** A layered part cut into elements, layer by layer from the start face. */
export interface WallGrid {
  readonly shape: Shape;
  /** nodes: unknowns on the faces, the layer edges and the ends of all elements; cells: at the centres of the elements. */
  readonly kind: 'nodes' | 'cells';
  /** Lengths of the elements of every layer, m. Lengths, not positions: a thin layer deep in the part keeps its digits. */
  readonly elements: readonly Float64Array[];
  /** Thickness of every layer, m. */
  readonly thickness: readonly number[];
  /** Rows next to either edge of every layer whose storage is to be plain, because a jump there is finer than the grid. */
  readonly plainRows?: readonly PlainRows[];
}

/** Number of rows counted from a layer's edge towards the start face, and from that towards the end face. */
export interface PlainRows {
  start: number;
  end: number;
}

/** The same number of equal elements over the whole of each layer. */
export function equalGrid(
  kind: WallGrid['kind'],
  thickness: readonly number[],
  elements: readonly number[],
  shape: Shape = FLAT,
): WallGrid {
  return {
    shape,
    kind,
    thickness,
    elements: thickness.map((whole, layer) => new Float64Array(elements[layer]).fill(whole / elements[layer])),
  };
}
