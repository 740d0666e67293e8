/**
 * First eigenvalue ζ and coefficient C of the cooling wall, θ ≈ C exp(−ζ² Fo) in the middle, read off solved temperatures.
 * Handbook table of one-term coefficients (the numbers behind Heisler's charts): Y. A. Çengel, Heat and Mass Transfer, table 4-2;
 * cases/c01-one-term-coefficients.json. Claim: four decimals.
 */
import { describe, expect, it } from 'vitest';
import { automatic, crankNicolson, film, temperaturesAt, wall, wallCoefficient, wallRoot } from '../support';
import oneTerm from './cases/c01-one-term-coefficients.json';

const FOUR_DECIMALS = 0.5e-4;

/** A wall of Fo = t and Bi = h; θ in thousandths. */
const unitWall = (biot: number, until: number) =>
  wall({
    layers: [{ thickness: 1, conductivity: 1, density: 1, heatCapacity: 1 }],
    initial: 1000,
    stages: [{ lasts: until, end: film(biot, 0) }],
  });

describe.each([automatic(0.002), crankNicolson(1 / 2000, { nodes: 401 })])(
  'one-term coefficients of a wall, $name',
  ({ under }) => {
    // Crank–Nicolson with its small step is kept to the rows that are over soon.
    const rows = oneTerm.expected.filter(({ Bi }) => under(unitWall(1, 1)).settings.scheme === 'automatic' || Bi >= 1);

    it.each(rows)('Bi = $Bi', ({ Bi, wall: [zeta, coefficient] }) => {
      // From the first time the second term has died away (below 1e-6 of the first), over one time constant.
      const first = 14 / (wallRoot(Bi, 1) ** 2 - zeta ** 2);
      const second = first + 1 / zeta ** 2;
      const [[early], [late]] = temperaturesAt(under(unitWall(Bi, second)), [0], [first, second]);
      const found = Math.sqrt(Math.log(early / late) / (second - first));
      expect(Math.abs(found - zeta)).toBeLessThanOrEqual(FOUR_DECIMALS);
      expect(Math.abs((early / 1000) * Math.exp(found ** 2 * first) - coefficient)).toBeLessThanOrEqual(FOUR_DECIMALS);
    });
  },
);

describe('the series of these tests', () => {
  it.each(oneTerm.expected)('has the tabulated root and coefficient at Bi = $Bi', ({ Bi, wall: [zeta, coefficient] }) => {
    expect(Math.abs(wallRoot(Bi, 0) - zeta)).toBeLessThanOrEqual(1e-6);
    expect(Math.abs(wallCoefficient(wallRoot(Bi, 0)) - coefficient)).toBeLessThanOrEqual(1e-6);
  });
});
