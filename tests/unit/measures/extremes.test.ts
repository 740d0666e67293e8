import { describe, expect, it } from 'vitest';
import { ExtremesReader, differenceInPiece, materialPieces, newExtremes } from '../../../solver/measures/extremes';
import { peakBeside } from '../../../solver/measures/peak';
import { equalPoints } from '../../support/madeUpRun';
import { plan } from '../../support/plan';

const peakOf = (x: number[], v: number[], sign: 1 | -1) => {
  const top = v.indexOf(sign > 0 ? Math.max(...v) : Math.min(...v));
  const out = { position: 0, value: 0 };
  peakBeside(x, v, 0, x.length - 1, top, sign, out);
  return out;
};

describe('the extreme of a profile between its points', () => {
  it('is that of the parabola when the profile is one, on unequal spacing, wherever its top lies', () => {
    const x = [0, 0.1, 0.25, 0.45, 0.6, 0.8, 1];
    for (const top of [0.13, 0.25, 0.3, 0.44, 0.46, 0.7]) {
      const peak = peakOf(
        x,
        x.map((at) => 300 - 90 * (at - top) ** 2),
        1,
      );
      expect(peak.position).toBeCloseTo(top, 12);
      expect(peak.value).toBeCloseTo(300, 11);
    }
  });

  it('nears that of a smooth profile with the third power of the spacing, or faster', () => {
    const errors = [16, 32, 64].map((cells) => {
      const x = Array.from({ length: cells + 1 }, (_, i) => i / cells);
      return Math.abs(
        peakOf(
          x,
          x.map((at) => Math.exp(-at) * Math.sin(3 * at)),
          1,
        ).value -
          Math.exp(-Math.atan(3) / 3) * Math.sin(Math.atan(3)),
      );
    });
    expect(Math.log2(errors[0] / errors[2]) / 2).toBeGreaterThan(2.7);
  });

  it('invents nothing ahead of a steep front', () => {
    const x = [0, 1, 2, 3, 4, 5];
    expect(peakOf(x, [20, 20.01, 20, 19.99, 25, 500], -1).value).toBeGreaterThan(19.9);
    expect(peakOf(x, [500, 60, 22, 20.1, 20.01, 20], -1)).toEqual({ position: 5, value: 20 });
    expect(peakOf(x, [500, 60, 22, 20.1, 20.01, 20], 1)).toEqual({ position: 0, value: 500 });
  });

  it('passes from one interval to the next without a jump', () => {
    const x = [0, 0.1, 0.22, 0.35, 0.5, 0.62, 0.75, 0.9, 1];
    const heightFor = (top: number) =>
      peakOf(
        x,
        x.map((at) => Math.cos(4 * (at - top)) + 0.3 * Math.sin(9 * (at - top))),
        1,
      ).value;
    let before = heightFor(0.3);
    for (let top = 0.3; top < 0.7; top += 1e-4) {
      const now = heightFor(top);
      expect(Math.abs(now - before)).toBeLessThan(2e-4);
      before = now;
    }
  });
});

describe('pieces of one material', () => {
  it('are neighbouring layers of it, bonded without resistance', () => {
    const { part } = plan({
      layers: [0.1, 0.1, 0.1, 0.1, 0.1],
      materials: ['a', 'a', 'b', 'a', 'a'],
      contacts: [0, 0, 0, 0.001, 0],
    });
    expect(materialPieces(part)).toEqual([
      { material: 'a', first: 0, last: 1 },
      { material: 'b', first: 2, last: 2 },
      { material: 'a', first: 3, last: 3 },
      { material: 'a', first: 4, last: 4 },
    ]);
  });

  it('set the largest difference within one material, while the part spans all of them', () => {
    const { part } = plan({ layers: [1, 1, 1], materials: ['a', 'a', 'b'], contacts: [0, 0.01, 0] });
    const points = equalPoints([1, 1, 1], 3);
    const extremes = newExtremes();
    new ExtremesReader(points, part).read(Float64Array.of(100, 95, 90, 90, 70, 60, 10, 5, 0), extremes);
    expect(extremes.coldest).toEqual({ position: 3, value: 0 });
    expect(extremes.hottest).toEqual({ position: 0, value: 100 });
    expect(differenceInPiece(extremes)).toBe(40);
    expect(extremes.piece.material).toBe('a');
    expect([extremes.coldestInPiece.position, extremes.hottestInPiece.position]).toEqual([2, 0]);
  });
});
