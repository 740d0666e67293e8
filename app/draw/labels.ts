/** Places for labels: beside their points, clear of each other, and where they were before if that still fits. */

export interface Box {
  x: number;
  y: number;
  width: number;
  height: number;
}

/** A point that wants a label of a given size. */
export interface Anchor {
  x: number;
  y: number;
  width: number;
  height: number;
}

export interface Placed {
  box: Box;
  /** Which of the candidate places it took: hand it back next time, so that labels do not hop about while playing. */
  choice: number;
}

/** Room between a point and its label, and between labels, px. */
const GAP = 9;
const AIR = 2;

const overlaps = (a: Box, b: Box): boolean =>
  a.x < b.x + b.width + AIR && b.x < a.x + a.width + AIR && a.y < b.y + b.height + AIR && b.y < a.y + a.height + AIR;

const inside = (a: Box, bounds: Box): boolean =>
  a.x >= bounds.x && a.y >= bounds.y && a.x + a.width <= bounds.x + bounds.width && a.y + a.height <= bounds.y + bounds.height;

/** Candidate places round a point: right above, left above, over, right below, left below, under, then further off. */
function candidates(anchor: Anchor): Box[] {
  const { x, y, width, height } = anchor;
  const boxes: Box[] = [];
  for (const reach of [GAP, GAP + height + AIR, GAP + 2 * (height + AIR), GAP + 3 * (height + AIR)]) {
    const above = y - reach - height;
    const below = y + reach;
    for (const top of [above, below]) {
      for (const left of [x + GAP, x - GAP - width, x - width / 2]) boxes.push({ x: left, y: top, width, height });
    }
  }
  return boxes;
}

/**
 * Places one label an anchor within `bounds`, clear of `taken` and of each other; null for those that find no room.
 *
 * The choice of last time is tried first. Greedy in the order given: put the important ones first.
 */
export function placeLabels(
  anchors: readonly Anchor[],
  bounds: Box,
  taken: readonly Box[] = [],
  previous: readonly (number | undefined)[] = [],
): (Placed | null)[] {
  const occupied = [...taken];
  return anchors.map((anchor, i) => {
    const boxes = candidates(anchor);
    const before = previous[i];
    const order = before === undefined ? [] : [before];
    for (let k = 0; k < boxes.length; k++) if (k !== before) order.push(k);
    for (const choice of order) {
      const box = boxes[choice];
      if (!inside(box, bounds) || occupied.some((other) => overlaps(box, other))) continue;
      occupied.push(box);
      return { box, choice };
    }
    return null;
  });
}

/**
 * Heights for a column of labels that would lie at `wanted` (rising): pushed apart to at least `gap`, kept between `top`
 * and `bottom` as far as they fit, and moved as little as that allows.
 */
export function spread(wanted: readonly number[], gap: number, top: number, bottom: number): number[] {
  const out = [...wanted];
  for (let i = 0; i < out.length; i++) out[i] = Math.max(out[i], i === 0 ? top : out[i - 1] + gap);
  for (let i = out.length - 1; i >= 0; i--) {
    const limit = i === out.length - 1 ? bottom : out[i + 1] - gap;
    if (out[i] > limit) out[i] = limit;
  }
  return out;
}
