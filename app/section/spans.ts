/** The largest difference in a profile, in the whole part or within one piece of one material, and where it lies. */
import type { Frames, Project } from '../../solver/model';

export interface Difference {
  value: number;
  /** Points of the frames. */
  hot: number;
  cold: number;
}

/** First point of every piece of one material, and the number of points: neighbouring layers of a material are one piece. */
export function piecesOf(frames: Frames, plan: Project): number[] {
  const starts: number[] = [];
  plan.part.layers.forEach(({ material }, layer) => {
    if (layer === 0 || material !== plan.part.layers[layer - 1].material) starts.push(frames.layerStart[layer]);
  });
  return [...starts, frames.position_m.length];
}

/** The largest difference within any of the pieces. */
export function largestWithin(profile: ArrayLike<number>, pieces: readonly number[]): Difference {
  let best: Difference = { value: -1, hot: 0, cold: 0 };
  for (let piece = 0; piece + 1 < pieces.length; piece++) {
    let hot = pieces[piece];
    let cold = hot;
    for (let i = hot; i < pieces[piece + 1]; i++) {
      if (profile[i] > profile[hot]) hot = i;
      if (profile[i] < profile[cold]) cold = i;
    }
    const value = profile[hot] - profile[cold];
    if (value > best.value) best = { value, hot, cold };
  }
  return best;
}
