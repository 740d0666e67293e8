import { describe, expect, it } from 'vitest';
import { Face } from '../../../solver/heat/face';
import type { HalfCell } from '../../../solver/heat/halfCell';
import { STEFAN_BOLTZMANN, thermalCurves } from '../../../solver/materials';
import type { Correlation, Curve, LaidExposure, Line } from '../../../solver/model';

const INTERVAL = { stage: 0, from: 100, to: 500 };
const line = (first: number, last = first): Line => ({ time: [100, 500], value: [first, last] });
const byTime = (expression: string) => ({ expression, stageStart: 100 });
const film = (more: Partial<Extract<LaidExposure, { kind: 'film' }>>): LaidExposure => ({
  kind: 'film',
  coefficient: { kind: 'course', course: line(40, 90) },
  surroundings: line(600, 900),
  radiation: null,
  ...more,
});
const quench: [number, number][] = [
  [20, 300],
  [120, 9000],
  [300, 4000],
  [500, 350],
  [900, 250],
];
const correlation = (more: Correlation): LaidExposure =>
  film({ coefficient: { kind: 'correlation', ...more }, surroundings: line(30, 60) });

const LAWS: [string, LaidExposure][] = [
  ['a flux over time', { kind: 'flux', flux: line(5000, -2000) }],
  ['a flux by expression', { kind: 'flux', flux: byTime('3000*sin(t/30) + clock') }],
  ['a film of a coefficient and surroundings that ramp', film({})],
  ['surroundings by expression', film({ surroundings: byTime('20 + 345*log10(8*t/60 + 1)') })],
  ['a quench curve', film({ coefficient: { kind: 'table', table: quench }, surroundings: line(40, 30) })],
  [
    'a coefficient by expression',
    film({
      coefficient: {
        kind: 'expression',
        expression: '5 + 0.02*Ts + 0.001*abs(Ts - 20)^1.25 + t/50 + clock/900',
        stageStart: 100,
      },
    }),
  ],
  [
    'radiation',
    film({ coefficient: { kind: 'course', course: line(0) }, radiation: { emissivity: 0.8, enclosure: line(300, 1100) } }),
  ],
  [
    'film and radiation, each to its own temperature',
    film({ radiation: { emissivity: 0.6, enclosure: byTime('500 + 0.5*t + 20*sin(t/40)') } }),
  ],
  ['natural convection on a vertical plate', correlation({ correlation: 'naturalVerticalPlate', fluid: 'air', length: 0.5 })],
  ['natural convection above a plate', correlation({ correlation: 'naturalPlateUp', fluid: 'air', length: 0.1 })],
  ['natural convection below a plate in water', correlation({ correlation: 'naturalPlateDown', fluid: 'water', length: 0.1 })],
  ['natural convection on a pipe', correlation({ correlation: 'naturalHorizontalCylinder', fluid: 'water', length: 0.05 })],
  ['a wind along a plate', correlation({ correlation: 'forcedPlate', fluid: 'air', length: 1, velocity: 12 })],
  ['a wind across a pipe', correlation({ correlation: 'forcedCylinder', fluid: 'air', length: 0.1, velocity: 5 })],
];

const halfCell = (conductivity: Curve, inverseDistance: number): HalfCell => ({
  curves: thermalCurves({ conductivity, density: 2000, heatCapacity: 900 }, 20),
  inverseDistance,
});
const BEHIND: [string, HalfCell | null][] = [
  ['with the unknown on the face', null],
  ['behind half a cell', halfCell(1.5, 200)],
  [
    'behind half a cell that conducts by temperature',
    halfCell(
      {
        table: [
          [0, 1],
          [500, 2.5],
          [1200, 1.5],
        ],
      },
      200,
    ),
  ],
];

function faceOf(exposure: LaidExposure, half: HalfCell | null): Face {
  const face = new Face(half);
  face.enter(exposure, INTERVAL);
  return face;
}
const fluxOf = (face: Face, temperature: number, time: number): number => {
  face.at(temperature, time);
  return face.flux;
};

describe.each(BEHIND)('%s', (_, half) => {
  // No temperature or time lies within a difference of a kink of any of these laws.
  const temperatures = [22.3, 47.7, 88.1, 231.9, 411.3, 733.7];
  const times = [150.3, 222.2, 400.7];

  it.each(LAWS)('the slopes by temperature and time are those of the flux: %s', (_name, exposure) => {
    const face = faceOf(exposure, half);
    for (const temperature of temperatures) {
      for (const time of times) {
        face.linearise(temperature, time);
        const { flux, fluxPerKelvin, fluxSlope } = face;
        expect(flux).toBeCloseTo(fluxOf(face, temperature, time), 8);
        const [dT, dt] = [0.02, 0.01];
        const byTemperature = (fluxOf(face, temperature + dT, time) - fluxOf(face, temperature - dT, time)) / (2 * dT);
        const bySecond = (fluxOf(face, temperature, time + dt) - fluxOf(face, temperature, time - dt)) / (2 * dt);
        expect(Math.abs(fluxPerKelvin - byTemperature)).toBeLessThan(1e-4 * (Math.abs(byTemperature) + 1));
        expect(Math.abs(fluxSlope - bySecond)).toBeLessThan(1e-4 * (Math.abs(bySecond) + 1));
      }
    }
  });

  it.each(LAWS)('the flux through the face is the flux behind it: %s', (_name, exposure) => {
    const face = faceOf(exposure, half);
    const onFace = faceOf(exposure, null);
    for (const temperature of temperatures) {
      const surface = face.faceTemperature(temperature, 222.2);
      const flux = fluxOf(face, temperature, 222.2);
      expect(flux).toBeCloseTo(fluxOf(onFace, surface, 222.2), 6);
      if (half === null) expect(surface).toBe(temperature);
      else {
        const { curves, inverseDistance } = half;
        const inwards = inverseDistance * (curves.conductionIntegral(surface) - curves.conductionIntegral(temperature));
        expect(Math.abs(flux - inwards)).toBeLessThan(1e-9 * (Math.abs(flux) + 1));
      }
    }
  });
});

describe('a face', () => {
  it('meets gas and enclosure each at its own temperature', () => {
    const face = faceOf(film({ radiation: { emissivity: 0.7, enclosure: line(1000) } }), null);
    const expected = 40 * (600 - 200) + 0.7 * STEFAN_BOLTZMANN * (1273.15 ** 4 - 473.15 ** 4);
    expect(fluxOf(face, 200, 100)).toBeCloseTo(expected, 6);
  });

  it('is held at a temperature where its unknown is the face, and pulls its cell where it is not', () => {
    const exposure: LaidExposure = { kind: 'temperature', temperature: byTime('100 + 2*t') };
    const held = faceOf(exposure, null);
    expect(held.holds).toBe(true);
    expect(held.heldAt(150)).toBe(200);
    expect(held.heldRateAt(150)).toBeCloseTo(2, 6);
    const half = halfCell(1.5, 200);
    const cell = faceOf(exposure, half);
    expect(cell.holds).toBe(false);
    expect(cell.faceTemperature(20, 150)).toBe(200);
    cell.linearise(20, 150);
    expect(cell.flux).toBeCloseTo(300 * 180, 6);
    expect(cell.fluxPerKelvin).toBeCloseTo(-300, 9);
    expect(cell.fluxSlope).toBeCloseTo(600, 3);
  });

  it('lets go of its temperature when the exposure is another', () => {
    const face = faceOf({ kind: 'temperature', temperature: line(100) }, null);
    face.enter({ kind: 'insulated' }, INTERVAL);
    expect(face.holds).toBe(false);
    expect(() => face.heldAt(200)).toThrow('not held');
    expect(fluxOf(face, 500, 200)).toBe(0);
  });

  it('takes a coefficient that an expression puts below 0 for 0', () => {
    const face = faceOf(film({ coefficient: { kind: 'expression', expression: 'Ts - 50', stageStart: 0 } }), null);
    expect(fluxOf(face, 20, 200)).toBe(0);
    expect(fluxOf(face, 60, 100)).toBeCloseTo(10 * 540, 6);
  });

  it('finds its temperature behind half a cell where boiling gives it several to choose from, and its cell pulls it back', () => {
    // Half a cell of 30 mm of steel under a boiling curve: the balance is not monotonous.
    const half = halfCell(20, 30);
    const exposure = film({ coefficient: { kind: 'table', table: quench }, surroundings: line(30) });
    const face = faceOf(exposure, half);
    for (let temperature = 30; temperature < 1000; temperature += 7) {
      const surface = face.faceTemperature(temperature, 200);
      expect(surface).toBeGreaterThanOrEqual(30);
      expect(surface).toBeLessThanOrEqual(temperature);
      const flux = fluxOf(face, temperature, 200);
      expect(Math.abs(flux - 20 * 30 * (surface - temperature))).toBeLessThan(1e-6 * (1 + Math.abs(flux)));
    }
  });

  it('says what its correlation is used outside of, by the temperature of the face itself', () => {
    const exposure = correlation({ correlation: 'naturalPlateUp', fluid: 'air', length: 0.004 });
    expect(faceOf(exposure, null).outOfRange(200, 100)[0].what).toBe('Ra');
    expect(faceOf(exposure, null).outOfRange(30.5, 100)).toEqual([]);
    expect(faceOf({ kind: 'insulated' }, null).outOfRange(200, 100)).toEqual([]);
  });
});
