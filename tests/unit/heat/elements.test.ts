import { describe, expect, it } from 'vitest';
import { areaAt, FLAT, resistanceFrom, volumeFrom, type Shape } from '../../../solver/grid';
import {
  cellElements,
  fourthOrderElements,
  plainElements,
  weightOnNode,
  type CutLayer,
  type Elements,
} from '../../../solver/heat/elements';

const lengths = Float64Array.of(1, 1.4, 1.9, 1.5, 1.2, 0.8);
const total = lengths.reduce((a, b) => a + b, 0);
const shapes: [string, Shape, number][] = [
  ['a wall', FLAT, 3],
  ['a hollow cylinder', { kind: 'cylinder', innerRadius: 2 }, 0],
  ['an outer layer of a solid cylinder', { kind: 'cylinder', innerRadius: 0 }, 1.5],
  ['a hollow sphere', { kind: 'sphere', innerRadius: 0.5 }, 2],
];
const solids: [string, Shape, number][] = [
  ['a solid cylinder', { kind: 'cylinder', innerRadius: 0 }, 0],
  ['a solid sphere', { kind: 'sphere', innerRadius: 0 }, 0],
];

/** What every row stores of a heat content H(depth). */
function stored({ weights, depth }: Elements, heat: (depth: number) => number): number[] {
  const last = depth.length - 1;
  return Array.from(depth, (x, i) => {
    let sum = weights.here[i] * heat(x);
    if (i > 0) sum += weights.before[i] * heat(depth[i - 1]);
    if (i < last) sum += weights.after[i] * heat(depth[i + 1]);
    if (i === 0 && last > 1) sum += weights.far[0] * heat(depth[2]);
    if (i === last && last > 1) sum += weights.far[last] * heat(depth[last - 2]);
    return sum;
  });
}

/** ∫ f dV between two depths, by Simpson's rule on many pieces. */
function integral(shape: Shape, from: number, to: number, f: (depth: number) => number): number {
  const parts = 2000;
  const width = (to - from) / parts;
  const at = (i: number): number => f(from + i * width) * areaAt(shape, from + i * width);
  let sum = 0;
  for (let i = 0; i < parts; i++) sum += (width / 6) * (at(i) + 4 * at(i + 0.5) + at(i + 1));
  return sum;
}

/** ∫ φ_i f dV of the hats that conduct steadily; the first hat of a solid part is 1 in the core. */
function hatIntegrals(shape: Shape, { depth }: Elements, f: (depth: number) => number): number[] {
  return Array.from(depth, (x, i) => {
    let sum = 0;
    if (i > 0) {
      const from = depth[i - 1];
      const whole = resistanceFrom(shape, from, x - from);
      sum += integral(shape, from, x, (at) => (f(at) * resistanceFrom(shape, from, at - from)) / whole);
    } else if (shape.innerRadius === 0 && shape.kind !== 'wall' && x === lengths[0]) sum += integral(shape, 0, x, f);
    if (i + 1 < depth.length) {
      const to = depth[i + 1];
      const whole = resistanceFrom(shape, x, to - x);
      sum += integral(shape, x, to, (at) => (f(at) * resistanceFrom(shape, at, to - at)) / whole);
    }
    return sum;
  });
}

const kinds: [string, (layer: CutLayer) => Elements][] = [
  ['cells', cellElements],
  ['plain', plainElements],
  ['of fourth order', fourthOrderElements],
  ['of fourth order with plain rows', (layer) => fourthOrderElements(layer, { start: 2, end: 1 })],
];

describe.each([...shapes, ...solids])('elements of %s', (_, shape, edge) => {
  it.each(kinds)('hold the volume of the layer in all: %s', (_, elementsOf) => {
    const elements = elementsOf({ shape, edge, lengths });
    const volume = stored(elements, () => 1).reduce((a, b) => a + b, 0);
    expect(volume / volumeFrom(shape, edge, total)).toBeCloseTo(1, 10);
    const onNodes = Array.from(elements.depth, (_, i) => weightOnNode(elements.weights, i)).reduce((a, b) => a + b, 0);
    expect(onNodes / volume).toBeCloseTo(1, 12);
  });

  it('of fourth order are exact for a parabola, ends included, as for its own harmonic hats', () => {
    const elements = fourthOrderElements({ shape, edge, lengths });
    // The core of a solid part knows even parabolas only.
    const powers = edge === 0 && shape.innerRadius === 0 ? [0, 2] : [0, 1, 2];
    for (const power of powers) {
      const exact = hatIntegrals(shape, elements, (depth) => depth ** power);
      const found = stored(elements, (depth) => depth ** power);
      found.forEach((value, i) => expect(value / exact[i]).toBeCloseTo(1, 7));
    }
  });
});

describe.each(shapes)('conduction in %s', (_, shape, edge) => {
  it('of fourth order is that of the steady state, over any two nodes', () => {
    const { shapeFactor } = fourthOrderElements({ shape, edge, lengths });
    const resistance = shapeFactor.reduce((sum, s) => sum + 1 / s, 0);
    const [inner, outer] = [shape.innerRadius + edge, shape.innerRadius + edge + total];
    const exact = {
      wall: total,
      cylinder: Math.log(outer / inner) / (2 * Math.PI),
      sphere: (1 / inner - 1 / outer) / (4 * Math.PI),
    }[shape.kind];
    expect(resistance / exact).toBeCloseTo(1, 13);
  });

  it('of plain volumes and of cells takes the area halfway over the distance', () => {
    const plain = plainElements({ shape, edge, lengths });
    expect(plain.shapeFactor[1]).toBeCloseTo(areaAt(shape, edge + 1 + 0.7) / 1.4, 12);
    const cells = cellElements({ shape, edge, lengths });
    expect(cells.shapeFactor[0]).toBeCloseTo(areaAt(shape, edge + 1) / 1.2, 12);
    expect(cells.depth[1]).toBeCloseTo(edge + 1.7, 12);
  });
});

describe('the hat of a node', () => {
  it('on equal spacing of a wall has weights (1, 10, 1)/12, and (7, 6, −1)/24 at the ends', () => {
    const { weights } = fourthOrderElements({ shape: FLAT, edge: 0, lengths: new Float64Array(5).fill(12) });
    const row = (i: number) => [weights.before[i], weights.here[i], weights.after[i], weights.far[i]];
    const expectRow = (i: number, expected: number[]) => row(i).forEach((w, j) => expect(w).toBeCloseTo(expected[j], 12));
    expectRow(2, [1, 10, 1, 0]);
    expectRow(0, [0, 3.5, 3, -0.5]);
    expectRow(5, [3, 3.5, 0, -0.5]);
  });

  it('of a layer of two nodes follows a line', () => {
    const { weights } = fourthOrderElements({ shape: FLAT, edge: 0, lengths: Float64Array.of(6) });
    expect([...weights.here, ...weights.after, ...weights.before]).toEqual([2, 2, 1, 0, 0, 1]);
  });

  it('of a solid part of one piece is all of it', () => {
    const shape: Shape = { kind: 'sphere', innerRadius: 0 };
    const { weights, shapeFactor, depth } = fourthOrderElements({ shape, edge: 0, lengths: Float64Array.of(2) });
    expect(weights.here[0]).toBeCloseTo((4 / 3) * Math.PI * 8, 12);
    expect([...depth]).toEqual([2]);
    expect(shapeFactor.length).toBe(0);
  });

  it('on a cylinder of huge radius is that on a wall', () => {
    const radius = 1e7;
    const round = fourthOrderElements({ shape: { kind: 'cylinder', innerRadius: radius }, edge: 0, lengths });
    const flat = fourthOrderElements({ shape: FLAT, edge: 0, lengths });
    const area = 2 * Math.PI * radius;
    flat.weights.here.forEach((w, i) => expect(round.weights.here[i] / area / w).toBeCloseTo(1, 5));
    flat.shapeFactor.forEach((s, i) => expect(round.shapeFactor[i] / area / s).toBeCloseTo(1, 5));
  });
});

describe('a solid part', () => {
  it('has a node at its centre with plain volumes, and none with fourth order', () => {
    const solid: CutLayer = { shape: { kind: 'cylinder', innerRadius: 0 }, edge: 0, lengths };
    expect(plainElements(solid).depth[0]).toBe(0);
    expect(fourthOrderElements(solid).depth[0]).toBe(1);
    expect(fourthOrderElements(solid).depth.length).toBe(lengths.length);
  });
});

describe('shells', () => {
  it('resist as logarithms and inverses say, thin as they may be', () => {
    const cylinder: Shape = { kind: 'cylinder', innerRadius: 0.3 };
    for (const length of [1e-12, 1e-3, 0.3, 5, 1e4]) {
      expect(((resistanceFrom(cylinder, 0, length) * 2 * Math.PI) / Math.log1p(length / 0.3)).toPrecision(14)).toBe(
        '1.0000000000000',
      );
      const shell = { kind: 'sphere', innerRadius: 0.3 } as const;
      expect(resistanceFrom(shell, 0, length) * 4 * Math.PI).toBeCloseTo(length / 0.3 / (0.3 + length), 12);
    }
    expect(resistanceFrom({ kind: 'cylinder', innerRadius: 0 }, 0, 1)).toBe(Infinity);
    expect(resistanceFrom({ kind: 'sphere', innerRadius: 0 }, 0, 1)).toBe(Infinity);
  });

  it('have the volumes of geometry', () => {
    expect(volumeFrom({ kind: 'sphere', innerRadius: 1 }, 1, 2)).toBeCloseTo((4 / 3) * Math.PI * (64 - 8), 11);
    expect(volumeFrom({ kind: 'cylinder', innerRadius: 1 }, 1, 2)).toBeCloseTo(Math.PI * (16 - 4), 12);
    expect(volumeFrom(FLAT, 1, 2)).toBe(2);
  });
});
