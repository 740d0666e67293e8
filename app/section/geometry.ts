/** Places of the section's parts in its picture, px. */
import type { LayerRow, ValueAxis } from '../draw';

export interface SectionGeometry {
  width: number;
  height: number;
  /** The part: its faces, and the upper and lower edge of the plot. */
  left: number;
  right: number;
  top: number;
  bottom: number;
  row: LayerRow;
  axis: ValueAxis;
}

/** Room for axis and surroundings at the left, surroundings at the right, names above, strip and depths below. */
export const MARGIN = { left: 116, right: 108, top: 40, bottom: 52 } as const;
export const STRIP = 18;
/** Width of the words beside a face. */
export const SIDE = 68;
/** No layer is drawn narrower: thinner ones could be neither seen nor taken hold of. */
export const LEAST_LAYER = 6;
