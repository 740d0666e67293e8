/** The pieces of a curve that lie beyond a limit, cut exactly where they cross it. */
import type { Points } from './decimate';

/** Pieces with values above (side 1) or below (side −1) the limit; each begins and ends on it, or at an end of the curve. */
export function piecesBeyond({ time, value }: Points, limit: number, side: 1 | -1): Points[] {
  const pieces: Points[] = [];
  let piece: Points | null = null;
  const beyond = (i: number): boolean => side * (value[i] - limit) > 0;
  for (let i = 0; i < time.length; i++) {
    if (i > 0 && beyond(i) !== beyond(i - 1)) {
      const share = (limit - value[i - 1]) / (value[i] - value[i - 1]);
      const crossing = time[i - 1] + share * (time[i] - time[i - 1]);
      piece ??= { time: [], value: [] };
      piece.time.push(crossing);
      piece.value.push(limit);
      if (!beyond(i)) {
        pieces.push(piece);
        piece = null;
      }
    }
    if (!beyond(i)) continue;
    piece ??= { time: [], value: [] };
    piece.time.push(time[i]);
    piece.value.push(value[i]);
  }
  if (piece !== null) pieces.push(piece);
  return pieces;
}
