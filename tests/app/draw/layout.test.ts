import { describe, expect, it } from 'vitest';
import {
  areaPath,
  colourOf,
  cividis,
  difference,
  gradientOf,
  layLayers,
  linePath,
  paintRow,
  placeLabels,
  seriesStyle,
  spread,
} from '../../../app/draw';

describe('layLayers', () => {
  it('gives every layer its share of the width when all are thick enough', () => {
    const row = layLayers([0.15, 0.075, 0.012], 100, 337, 6);
    expect(row.toScale).toBe(true);
    expect(row.edges.map((edge) => Math.round(edge))).toEqual([100, 250, 325, 337]);
    expect(row.at(0.075)).toBeCloseTo(175, 9);
  });

  it('widens only the layers too thin to take hold of, and says so', () => {
    const row = layLayers([0.3, 0.0001, 0.3], 0, 606, 6);
    expect(row.toScale).toBe(false);
    expect(row.widened).toEqual([false, true, false]);
    expect(row.edges).toEqual([0, 300, 306, 606]);
  });

  it('finds the depth of a pixel again, inside widened layers too', () => {
    const row = layLayers([0.3, 0.0001, 0.2], 0, 600, 8);
    for (const depth of [0, 0.12, 0.30003, 0.4, 0.5001]) expect(row.depthAt(row.at(depth))).toBeCloseTo(depth, 10);
  });

  it('keeps 30 very unequal layers all visible', () => {
    const thicknesses = Array.from({ length: 30 }, (_, i) => (i % 5 === 0 ? 0.05 : 0.00002));
    const row = layLayers(thicknesses, 0, 600, 8);
    for (let i = 0; i < 30; i++) expect(row.edges[i + 1] - row.edges[i]).toBeGreaterThanOrEqual(8 - 1e-9);
    expect(row.edges[30]).toBe(600);
  });

  it('shares the width equally when not even the least widths fit', () => {
    const row = layLayers([1, 2, 3, 4], 0, 20, 8);
    expect(row.edges).toEqual([0, 5, 10, 15, 20]);
  });

  it('puts a depth on an edge into the layer after it, or before it when asked', () => {
    const row = layLayers([0.1, 0.1], 0, 100, 4);
    expect(row.layerAt(0.1)).toBe(1);
    expect(row.layerAt(0.1, true)).toBe(0);
    expect(row.layerAt(0.2)).toBe(1);
  });
});

describe('placeLabels', () => {
  const bounds = { x: 0, y: 0, width: 400, height: 200 };
  const label = (x: number, y: number) => ({ x, y, width: 64, height: 18 });

  it('keeps labels off each other and inside', () => {
    const anchors = [label(100, 100), label(104, 102), label(108, 98), label(398, 4)];
    const placed = placeLabels(anchors, bounds).map((place) => place?.box);
    for (const [i, a] of placed.entries()) {
      expect(a, `label ${i}`).toBeDefined();
      expect(a?.x).toBeGreaterThanOrEqual(0);
      expect((a?.x ?? 0) + 64).toBeLessThanOrEqual(400);
      for (const b of placed.slice(i + 1)) {
        const apart = a && b && (a.x + 64 <= b.x || b.x + 64 <= a.x || a.y + 18 <= b.y || b.y + 18 <= a.y);
        expect(apart).toBe(true);
      }
    }
  });

  it('stays where it was while that place is free', () => {
    const first = placeLabels([label(100, 100)], bounds)[0];
    const again = placeLabels([label(120, 90)], bounds, [], [3])[0];
    expect(first?.choice).toBe(0);
    expect(again?.choice).toBe(3);
  });

  it('gives none where there is no room', () => {
    expect(placeLabels([label(100, 100)], bounds, [bounds])).toEqual([null]);
  });
});

describe('spread', () => {
  it('pushes labels apart without leaving the column', () => {
    expect(spread([10, 12, 14], 13, 0, 100)).toEqual([10, 23, 36]);
    expect(spread([80, 90, 95], 13, 0, 100)).toEqual([74, 87, 100]);
    expect(spread([10, 50], 13, 0, 100)).toEqual([10, 50]);
  });
});

describe('colours', () => {
  it('run from the low to the high end and hold outside values at the ends', () => {
    expect(colourOf(cividis, 0, 0, 600)).toBe('rgb(0 34 78)');
    expect(colourOf(cividis, 900, 0, 600)).toBe(colourOf(cividis, 600, 0, 600));
    expect(colourOf(cividis, 5, 5, 5)).toBe('rgb(0 34 78)');
  });

  it('get brighter all the way, so that they hold in grey', () => {
    const grey = Array.from({ length: 256 }, (_, i) => {
      const [r, g, b] = [0, 1, 2].map((c) => cividis.rows[3 * i + c]);
      return 0.2126 * r + 0.7152 * g + 0.0722 * b;
    });
    for (let i = 1; i < 256; i++) expect(grey[i], `row ${i}`).toBeGreaterThan(grey[i - 1] - 1);
    expect(grey[255] - grey[0]).toBeGreaterThan(150);
  });

  it('has its palest colour in the middle of the map for signed quantities', () => {
    const sum = (row: number): number => difference.rows[3 * row] + difference.rows[3 * row + 1] + difference.rows[3 * row + 2];
    expect(sum(128)).toBeGreaterThan(sum(30));
    expect(sum(128)).toBeGreaterThan(sum(225));
  });

  it('paint a row of pixels and a gradient', () => {
    const out = new Uint8ClampedArray(8);
    paintRow(cividis, [0, 1], 0, 1, out);
    expect([...out]).toEqual([0, 34, 78, 255, 254, 232, 56, 255]);
    expect(gradientOf(cividis, 2)).toBe('linear-gradient(90deg, rgb(0 34 78), rgb(254 232 56))');
  });
});

describe('paths and series', () => {
  it('break a line at a missing value', () => {
    expect(linePath([0, 1, 2, 3], [5, Number.NaN, 7.123456, 8])).toBe('M0 5M2 7.12L3 8');
    expect(areaPath([0, 1], [5, 6], [1, 2])).toBe('M0 5L1 6L1 2L0 1Z');
    expect(linePath([], [])).toBe('');
  });

  it('never give two series the same letter, nor the same colour with the same dash among the first 24', () => {
    const styles = Array.from({ length: 40 }, (_, i) => seriesStyle(i));
    expect(new Set(styles.map((style) => style.letter)).size).toBe(40);
    expect(new Set(styles.slice(0, 24).map((style) => style.colour + style.dash.join())).size).toBe(24);
    expect(styles[27].letter).toBe('AB');
  });
});
