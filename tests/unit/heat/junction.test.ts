import { describe, expect, it } from 'vitest';
import { across } from '../../../solver/heat/gap';
import { crossing, type HalfCell } from '../../../solver/heat/halfCell';
import { Junction } from '../../../solver/heat/junction';
import { FLUIDS, STEFAN_BOLTZMANN, thermalCurves } from '../../../solver/materials';
import type { Contact, Curve } from '../../../solver/model';

const halfCell = (conductivity: Curve, inverseDistance: number): HalfCell => ({
  curves: thermalCurves({ conductivity, density: 2000, heatCapacity: 900 }, 20),
  inverseDistance,
});
const gap: Contact = { gap: 0.004, emissivities: [0.8, 0.6] };
const falling: Curve = {
  table: [
    [0, 3],
    [400, 1.2],
    [1000, 2],
  ],
};

const JUNCTIONS: [string, Contact, HalfCell | null, HalfCell | null][] = [
  ['a contact between nodes', 2e-3, null, null],
  ['a gap between nodes', gap, null, null],
  ['bonded cells', 0, halfCell(1.5, 200), halfCell(40, 300)],
  ['cells with a contact', 2e-3, halfCell(1.5, 200), halfCell(40, 300)],
  ['bonded cells that conduct by temperature', 0, halfCell(falling, 200), halfCell(1.5, 300)],
  ['cells with a contact that conduct by temperature', 2e-3, halfCell(falling, 200), halfCell(falling, 300)],
  ['cells with a gap', gap, halfCell(1.5, 200), halfCell(40, 300)],
  ['cells with a gap that conduct by temperature', gap, halfCell(falling, 200), halfCell(falling, 300)],
];
const junctionOf = (contact: Contact, before: HalfCell | null, after: HalfCell | null) =>
  new Junction(before, across(contact), after);

describe.each(JUNCTIONS)('%s', (_, contact, before, after) => {
  const pairs = [
    [20, 21],
    [700, 153],
    [90, 888],
    [451, 450.3],
  ] as const;
  const junction = junctionOf(contact, before, after);
  const fluxAt = (first: number, second: number): number => {
    junction.at(first, second);
    return junction.flux;
  };

  it.each(pairs)('the slopes are those of the flux: %d and %d °C', (first, second) => {
    junction.at(first, second);
    const { perFirst, perSecond } = junction;
    const half = 0.02;
    const byFirst = (fluxAt(first + half, second) - fluxAt(first - half, second)) / (2 * half);
    const bySecond = (fluxAt(first, second + half) - fluxAt(first, second - half)) / (2 * half);
    expect(perFirst / byFirst).toBeCloseTo(1, 5);
    expect(perSecond / bySecond).toBeCloseTo(1, 5);
    expect(perFirst).toBeGreaterThan(0);
    expect(perSecond).toBeLessThan(0);
  });

  it.each(pairs)('the flux is the same all the way through: %d and %d °C', (first, second) => {
    junction.at(first, second);
    const { flux, firstWall, secondWall } = junction;
    const close = 1e-8 * (1 + Math.abs(flux));
    for (const [half, from, to] of [
      [before, first, firstWall],
      [after, secondWall, second],
    ] as const) {
      if (half === null) expect(from).toBe(to);
      else {
        const inside = half.inverseDistance * (half.curves.conductionIntegral(from) - half.curves.conductionIntegral(to));
        expect(Math.abs(inside - flux)).toBeLessThan(close);
      }
    }
    if (contact === 0) expect(firstWall).toBe(secondWall);
    else {
      const between = across(contact);
      between?.at(firstWall, secondWall);
      expect(Math.abs((between?.flux ?? NaN) - flux)).toBeLessThan(close);
    }
  });

  it('lets nothing through between equal temperatures, and turns its sign with them', () => {
    expect(Math.abs(fluxAt(300, 300))).toBeLessThan(1e-9);
    expect(Math.sign(fluxAt(400, 300))).toBe(1);
    expect(Math.sign(fluxAt(300, 400))).toBe(-1);
  });
});

describe('a gas gap', () => {
  it('conducts as still air of its mean temperature, and radiates between its walls', () => {
    const between = across(gap);
    between?.at(600, 200);
    const air = (FLUIDS.air.conductivity(400) / 0.004) * 400;
    const grey = (STEFAN_BOLTZMANN / (1 / 0.8 + 1 / 0.6 - 1)) * (873.15 ** 4 - 473.15 ** 4);
    expect(between?.flux).toBeCloseTo(air + grey, 6);
    expect(between?.constant).toBe(false);
  });

  it('of no width worth mentioning lets a wall be as warm as its neighbour', () => {
    const junction = junctionOf({ gap: 1e-6, emissivities: [0.9, 0.9] }, halfCell(1.5, 200), halfCell(1.5, 200));
    junction.at(500, 100);
    expect(Math.abs(junction.firstWall - junction.secondWall)).toBeLessThan(4);
    expect(junction.flux).toBeGreaterThan(0.98 * 150 * 400);
  });

  it('is perfect contact only where a resistance is 0', () => {
    expect(across(0)).toBeNull();
    expect(across(1e-9)).not.toBeNull();
  });
});

describe('the crossing of a falling function', () => {
  it('is found from afar, between bounds and without any', () => {
    const cubic = (at: number, out: { value: number; slope: number }): void => {
      out.value = 8 - at * at * at;
      out.slope = -3 * at * at;
    };
    expect(crossing(cubic, 100, 0, 100)).toBeCloseTo(2, 13);
    expect(crossing(cubic, 0, -5, 5)).toBeCloseTo(2, 13);
    expect(crossing(cubic, 1, -Infinity, Infinity)).toBeCloseTo(2, 13);
  });

  it('is found where Newton alone would jump to and fro', () => {
    const arctangent = (at: number, out: { value: number; slope: number }): void => {
      out.value = -Math.atan(at - 3);
      out.slope = -1 / (1 + (at - 3) ** 2);
    };
    expect(crossing(arctangent, 40, -100, 100)).toBeCloseTo(3, 12);
  });
});
