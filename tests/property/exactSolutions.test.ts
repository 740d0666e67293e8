/**
 * Any wall and any half space against its exact solution: H. S. Carslaw and J. C. Jaeger, Conduction of Heat in Solids, 2nd ed., chapters
 * II and III (tests/support). The automatic scheme must keep its promise: within the accuracy asked for.
 */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  automatic,
  expectWithin,
  film,
  filmTheta,
  flux,
  fluxRise,
  held,
  heldFaceTheta,
  solved,
  temperaturesAt,
  wall,
  wallMeanTheta,
  wallTheta,
} from '../support';

const SEED = 20261201;
const between = (low: number, high: number) => fc.double({ min: low, max: high, noNaN: true });
/** Evenly spread over orders of magnitude. */
const magnitude = (low: number, high: number) => between(Math.log(low), Math.log(high)).map(Math.exp);

const material = fc.record({
  conductivity: magnitude(0.05, 300),
  density: magnitude(50, 9000),
  heatCapacity: magnitude(300, 4000),
});
const accuracies = fc.constantFrom(3, 1, 0.3, 0.1);

describe(`a wall in a fluid, seed ${SEED}`, () => {
  const walls = fc.record({
    material,
    thickness: magnitude(0.001, 2),
    biot: magnitude(0.01, 100),
    from: between(-200, 1500),
    step: fc.constantFrom(-1000, -300, 300, 1000),
    fourier: magnitude(0.02, 3),
    places: fc.array(between(0, 1), { minLength: 1, maxLength: 5 }),
    accuracy: accuracies,
  });

  it('is within the accuracy asked for of the series, at any Biot number, place and time', () => {
    fc.assert(
      fc.property(walls, ({ material: m, thickness, biot, from, step, fourier, places, accuracy }) => {
        const diffusivity = m.conductivity / (m.density * m.heatCapacity);
        const times = [0.3 * fourier, fourier].map((number) => (number * thickness ** 2) / diffusivity);
        const to = Math.max(from + step, -270);
        const plan = automatic(accuracy).under(
          wall({
            layers: [{ ...m, thickness }],
            initial: from,
            stages: [{ lasts: times[1], end: film((biot * m.conductivity) / thickness, to) }],
          }),
        );
        const expected = [0.3 * fourier, fourier].map((number) =>
          places.map((place) => to + (from - to) * wallTheta(biot, number, place)),
        );
        expectWithin(
          temperaturesAt(
            plan,
            places.map((place) => place * thickness),
            times,
          ),
          expected,
          accuracy,
        );
      }),
      { seed: SEED, numRuns: 60 },
    );
  });

  it('has taken up the heat of the series, in the audit and in the profile', () => {
    fc.assert(
      fc.property(walls, ({ material: m, thickness, biot, from, step, fourier, accuracy }) => {
        const capacity = m.density * m.heatCapacity;
        const end = (fourier * thickness ** 2 * capacity) / m.conductivity;
        const to = Math.max(from + step, -270);
        const plan = automatic(accuracy).under(
          wall({
            layers: [{ ...m, thickness }],
            initial: from,
            stages: [{ lasts: end, end: film((biot * m.conductivity) / thickness, to) }],
          }),
        );
        const { energy } = solved(plan, []);
        const rise = (to - from) * (1 - wallMeanTheta(biot, fourier));
        expect(Math.abs(energy.stored_J / (capacity * thickness) - rise)).toBeLessThanOrEqual(accuracy);
        expect(energy.closure).toBeLessThanOrEqual(1e-9);
      }),
      { seed: SEED, numRuns: 40 },
    );
  });
});

describe(`a half space under a step, seed ${SEED}`, () => {
  const halfSpaces = fc.record({
    material,
    time: magnitude(1, 1e6),
    depths: fc.array(between(0, 3), { minLength: 1, maxLength: 5 }),
    accuracy: accuracies,
    /** Relative to conduction over the distance that heat has come. */
    film: magnitude(0.05, 10),
  });
  type HalfSpace = typeof halfSpaces extends fc.Arbitrary<infer T> ? T : never;

  const check = (
    { material: m, time, depths, accuracy }: HalfSpace,
    start: Parameters<typeof wall>[0]['stages'][number]['start'],
    rise: (depth: number, at: number, solid: { conductivity: number; diffusivity: number }) => number,
  ): void => {
    const solid = { conductivity: m.conductivity, diffusivity: m.conductivity / (m.density * m.heatCapacity) };
    const reach = Math.sqrt(solid.diffusivity * time);
    const plan = automatic(accuracy).under(
      wall({ layers: [{ ...m, thickness: 8 * reach }], initial: 20, stages: [{ lasts: time, start }] }),
    );
    const places = depths.map((depth) => depth * reach);
    const times = [0.2 * time, time];
    const expected = times.map((at) => places.map((depth) => 20 + rise(depth, at, solid)));
    expectWithin(temperaturesAt(plan, places, times), expected, accuracy);
  };

  it('of its temperature', () => {
    fc.assert(
      fc.property(halfSpaces, (half) => check(half, held(520), (depth, at, solid) => 500 * heldFaceTheta(depth, at, solid))),
      { seed: SEED, numRuns: 40 },
    );
  });

  it('of its flux', () => {
    fc.assert(
      fc.property(halfSpaces, (half) => {
        const { conductivity, density, heatCapacity } = half.material;
        // So that its face grows hotter by 500 K or so.
        const q = (500 * conductivity) / Math.sqrt((conductivity / (density * heatCapacity)) * half.time);
        check(half, flux(q), (depth, at, solid) => q * fluxRise(depth, at, solid));
      }),
      { seed: SEED, numRuns: 40 },
    );
  });

  it('of the fluid before it', () => {
    fc.assert(
      fc.property(halfSpaces, (half) => {
        const { conductivity, density, heatCapacity } = half.material;
        const h = (half.film * conductivity) / Math.sqrt((conductivity / (density * heatCapacity)) * half.time);
        check(half, film(h, 620), (depth, at, solid) => 600 * filmTheta(depth, at, h, solid));
      }),
      { seed: SEED, numRuns: 40 },
    );
  });
});
