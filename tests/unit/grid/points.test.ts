import { describe, expect, it } from 'vitest';
import { equalGrid, fieldPoints, layerAt, stencilAt, type FieldPoints } from '../../../solver/grid';

const thickness = [0.1, 0.2, 0.3];

describe('points of a field', () => {
  it('have every layer with a point at both its edges, with nodes as with cells', () => {
    for (const kind of ['nodes', 'cells'] as const) {
      const { position, layerStart } = fieldPoints(equalGrid(kind, thickness, [3, 7, 9]));
      let edge = 0;
      thickness.forEach((length, layer) => {
        expect(position[layerStart[layer]]).toBe(edge);
        edge += length;
        expect(position[layerStart[layer + 1] - 1]).toBe(edge);
      });
      expect(position.length).toBe(layerStart[3]);
    }
  });

  it('are the nodes, with both edges of every element', () => {
    const { position } = fieldPoints(equalGrid('nodes', [1, 1], [2, 1]));
    expect([...position]).toEqual([0, 0.5, 1, 1, 2]);
  });

  it('are the centres of cells between the edges of layers', () => {
    const { position, layerStart } = fieldPoints(equalGrid('cells', [1, 2], [2, 1]));
    expect([...position]).toEqual([0, 0.25, 0.75, 1, 1, 2, 3]);
    expect([...layerStart]).toEqual([0, 4, 7]);
  });

  it('rise within a layer, however thin it is beside the others', () => {
    const { position, layerStart } = fieldPoints(equalGrid('nodes', [1, 1e-7, 1], [10, 5, 10]));
    for (let layer = 0; layer < 3; layer++) {
      for (let i = layerStart[layer] + 1; i < layerStart[layer + 1]; i++) expect(position[i]).toBeGreaterThan(position[i - 1]);
    }
  });
});

describe('the reading of a depth', () => {
  const points = fieldPoints(equalGrid('nodes', thickness, [3, 7, 9]));
  const read = (
    field: (depth: number, layer: number) => number,
    depth: number,
    layer?: number,
    of: FieldPoints = points,
  ): number => {
    const stencil = stencilAt(of, depth, layer);
    return stencil.points.reduce((sum, point, i) => {
      const owner = of.layerStart.findIndex((first) => first > point) - 1;
      return sum + stencil.weights[i] * field(of.position[point], owner);
    }, 0);
  };

  it('is exact for a polynomial of fifth degree where the layer has six points', () => {
    const polynomial = (x: number): number => ((((2 * x - 1) * x + 3) * x - 4) * x + 5) * x - 6;
    for (const depth of [0.1001, 0.15, 0.2222, 0.2999, 0.31, 0.45, 0.5999]) {
      expect(read(polynomial, depth)).toBeCloseTo(polynomial(depth), 12);
    }
  });

  it('is exact for a polynomial of as many terms as the layer has points', () => {
    const cubic = (x: number): number => ((x - 3) * x + 2) * x - 1;
    expect(read(cubic, 0.05)).toBeCloseTo(cubic(0.05), 13);
  });

  it('has weights that sum to one, all of one layer', () => {
    for (let depth = 0; depth <= 0.6; depth += 0.013) {
      const { points: chosen, weights } = stencilAt(points, depth);
      expect(weights.reduce((sum, weight) => sum + weight, 0)).toBeCloseTo(1, 12);
      const layer = layerAt(points, depth);
      for (const point of chosen) {
        expect(point).toBeGreaterThanOrEqual(points.layerStart[layer]);
        expect(point).toBeLessThan(points.layerStart[layer + 1]);
      }
    }
  });

  it('takes the layer nearer the start face at an interface, unless told the other', () => {
    const byLayer = (_: number, layer: number): number => layer;
    expect(read(byLayer, 0.1)).toBe(0);
    expect(read(byLayer, 0.1, 1)).toBe(1);
    expect(layerAt(points, 0.1 + 1e-9)).toBe(1);
  });

  it('is a point itself at that point', () => {
    expect(stencilAt(points, points.position[2])).toEqual({ points: Int32Array.of(2), weights: Float64Array.of(1) });
  });

  it('stays at the nearer face outside the part', () => {
    expect([...stencilAt(points, -1).points]).toEqual([0]);
    expect([...stencilAt(points, 99).points]).toEqual([points.position.length - 1]);
  });

  it('keeps to a straight line in a layer of two points', () => {
    const two = fieldPoints(equalGrid('nodes', [1], [1]));
    expect(read((x) => 3 * x + 1, 0.3, undefined, two)).toBeCloseTo(1.9, 13);
  });

  it('takes a single cell by its edges and its centre', () => {
    const one = fieldPoints(equalGrid('cells', [1], [1]));
    expect(read((x) => x * x, 0.3, undefined, one)).toBeCloseTo(0.09, 13);
  });
});
