/** The coldest and the hottest point of one profile, and the largest difference in the part and within one material. */
import type { Part } from '../model';
import type { FieldPoints } from '../stepping';
import { peakBeside, type Peak } from './peak';

/** Neighbouring layers of one material, bonded without contact resistance: a piece of one material. Layers by index, both included. */
export interface MaterialPiece {
  readonly material: string;
  readonly first: number;
  readonly last: number;
}

export function materialPieces({ layers }: Pick<Part, 'layers'>): MaterialPiece[] {
  const pieces: { material: string; first: number; last: number }[] = [];
  layers.forEach(({ material }, index) => {
    const before = pieces.at(-1);
    if (before?.material === material && layers[index - 1].contact === 0) before.last = index;
    else pieces.push({ material, first: index, last: index });
  });
  return pieces;
}

/** Extremes of one profile, refined between the points. */
export interface Extremes {
  readonly coldest: Peak;
  readonly hottest: Peak;
  /** The coldest and the hottest point of the piece of one material in which they differ most. */
  readonly coldestInPiece: Peak;
  readonly hottestInPiece: Peak;
  piece: MaterialPiece;
  /** Points beside which the four lie: as long as they stay the same, the four are smooth in time. */
  readonly beside: [number, number, number, number];
}

/** The largest difference within one material, K. */
export const differenceInPiece = ({ coldestInPiece, hottestInPiece }: Extremes): number =>
  hottestInPiece.value - coldestInPiece.value;

export const newExtremes = (): Extremes => ({
  coldest: { position: 0, value: 0 },
  hottest: { position: 0, value: 0 },
  coldestInPiece: { position: 0, value: 0 },
  hottestInPiece: { position: 0, value: 0 },
  piece: { material: '', first: 0, last: 0 },
  beside: [0, 0, 0, 0],
});

/** Reader of profiles at the points of a part. */
export class ExtremesReader {
  private readonly points: FieldPoints;
  private readonly pieces: readonly MaterialPiece[];
  private readonly low: Peak = { position: 0, value: 0 };
  private readonly high: Peak = { position: 0, value: 0 };
  private lowBeside = 0;
  private highBeside = 0;
  private readonly peak: Peak = { position: 0, value: 0 };

  constructor(points: FieldPoints, part: Pick<Part, 'layers'>) {
    this.points = points;
    this.pieces = materialPieces(part);
  }

  /** Fills `out` from a profile, °C at every point. Of equal extremes the one nearest to the start face counts. */
  read(profile: Float64Array, out: Extremes): void {
    let widest = -Infinity;
    out.coldest.value = Infinity;
    out.hottest.value = -Infinity;
    for (const piece of this.pieces) {
      this.readPiece(profile, piece);
      const { low, high } = this;
      if (low.value < out.coldest.value) {
        copy(low, out.coldest);
        out.beside[0] = this.lowBeside;
      }
      if (high.value > out.hottest.value) {
        copy(high, out.hottest);
        out.beside[1] = this.highBeside;
      }
      if (high.value - low.value > widest) {
        widest = high.value - low.value;
        copy(low, out.coldestInPiece);
        copy(high, out.hottestInPiece);
        out.piece = piece;
        out.beside[2] = this.lowBeside;
        out.beside[3] = this.highBeside;
      }
    }
  }

  /** Extremes of one piece into `low` and `high`, and the points beside which they lie. */
  private readPiece(profile: Float64Array, piece: MaterialPiece): void {
    const { low, high, peak } = this;
    const { position, layerStart } = this.points;
    low.value = Infinity;
    high.value = -Infinity;
    for (let layer = piece.first; layer <= piece.last; layer++) {
      const first = layerStart[layer];
      const last = layerStart[layer + 1] - 1;
      let cold = first;
      let hot = first;
      for (let i = first + 1; i <= last; i++) {
        if (profile[i] < profile[cold]) cold = i;
        else if (profile[i] > profile[hot]) hot = i;
      }
      peakBeside(position, profile, first, last, cold, -1, peak);
      if (peak.value < low.value) {
        copy(peak, low);
        this.lowBeside = cold;
      }
      peakBeside(position, profile, first, last, hot, 1, peak);
      if (peak.value > high.value) {
        copy(peak, high);
        this.highBeside = hot;
      }
    }
  }
}

function copy(from: Peak, to: Peak): void {
  to.position = from.position;
  to.value = from.value;
}
