import { describe, expect, it } from 'vitest';
import { thermalCurves, type ThermalCurves } from '../../../solver/materials';
import type { Material } from '../../../solver/model';

type Properties = Pick<Material, 'conductivity' | 'density' | 'heatCapacity' | 'latent'>;
const steel: Properties = { conductivity: 45, density: 7850, heatCapacity: 500 };
const varying: Properties = {
  conductivity: {
    table: [
      [20, 52],
      [400, 43],
      [800, 27],
    ],
  },
  density: {
    table: [
      [0, 7900],
      [900, 7500],
    ],
  },
  heatCapacity: {
    table: [
      [20, 460],
      [735, 1800],
      [770, 900],
    ],
  },
};

/** ∫ f dT by many small trapezia. */
function integral(f: (temperature: number) => number, from: number, to: number): number {
  const parts = 20000;
  const width = (to - from) / parts;
  let sum = 0.5 * (f(from) + f(to));
  for (let i = 1; i < parts; i++) sum += f(from + i * width);
  return sum * width;
}

const temperatures = [-200, 19, 20, 21, 399.5, 400, 640, 735, 760, 900, 1500];

/** Both integrals grow by their slopes. */
function expectIntegrals(curves: ThermalCurves, within: number): void {
  for (const [i, to] of temperatures.entries()) {
    if (i === 0) continue;
    const from = temperatures[i - 1];
    const heat = integral((at) => curves.heatCapacity(at), from, to);
    const theta = integral((at) => curves.conductivity(at), from, to);
    expect((curves.heatContent(to) - curves.heatContent(from)) / heat).toBeCloseTo(1, within);
    expect((curves.conductionIntegral(to) - curves.conductionIntegral(from)) / theta).toBeCloseTo(1, within);
  }
}

describe('a material with constant properties', () => {
  const curves = thermalCurves(steel, 20);

  it('holds no heat and conducts nothing at its reference temperature', () => {
    expect(curves.heatContent(20)).toBe(0);
    expect(curves.conductionIntegral(20)).toBe(0);
  });

  it('holds ρ c for every kelvin, and conducts k, to the last digit', () => {
    expect(curves.heatContent(21)).toBe(7850 * 500);
    expect(curves.conductionIntegral(21)).toBe(45);
    expect(curves.heatContent(0)).toBe(-20 * 7850 * 500);
    expect(curves.heatCapacity(1e4)).toBe(7850 * 500);
    expect(curves.conductivity(-273)).toBe(45);
  });

  it('knows that it is constant', () => {
    expect(curves.constant).toBe(true);
    expect(thermalCurves(varying, 20).constant).toBe(false);
  });
});

describe('a material of tables', () => {
  const curves = thermalCurves(varying, 20);

  it('has slopes straight between the points and constant beyond, density and heat capacity multiplied', () => {
    expect(curves.conductivity(210)).toBeCloseTo(47.5, 12);
    expect(curves.conductivity(-100)).toBe(52);
    expect(curves.conductivity(2000)).toBeCloseTo(27, 12);
    expect(curves.heatCapacity(377.5)).toBeCloseTo((7900 - (400 * 377.5) / 900) * 1130, 6);
    expect(curves.heatCapacity(2000)).toBeCloseTo(7500 * 900, 6);
  });

  it('has integrals that grow by their slopes, in whatever order it is asked', () => {
    expectIntegrals(curves, 6);
    const once = temperatures.map((at) => curves.heatContent(at));
    expect([...temperatures].reverse().map((at) => curves.heatContent(at))).toEqual([...once].reverse());
  });

  it('is zero at its reference, wherever that lies', () => {
    for (const reference of [-50, 20, 300, 735, 1200]) {
      const moved = thermalCurves(varying, reference);
      expect(moved.heatContent(reference)).toBe(0);
      expect(moved.conductionIntegral(reference)).toBe(0);
      const difference = moved.heatContent(800) - moved.heatContent(100);
      expect(difference / (curves.heatContent(800) - curves.heatContent(100))).toBeCloseTo(1, 12);
    }
  });

  it('knows the least and the greatest of its slopes between two temperatures', () => {
    const { conductivity, heatCapacity } = curves.slopesBetween(100, 700);
    expect(conductivity[0]).toBeCloseTo(curves.conductivity(700), 12);
    expect(conductivity[1]).toBeCloseTo(curves.conductivity(100), 12);
    expect(heatCapacity[0]).toBeCloseTo(curves.heatCapacity(100), 6);
    expect(heatCapacity[1]).toBeCloseTo(curves.heatCapacity(700), 6);
    expect(curves.slopesBetween(700, 760).heatCapacity[1]).toBeCloseTo(curves.heatCapacity(735), 6);
  });

  it('finds a greatest slope inside a piece, where density falls as heat capacity rises', () => {
    const material: Properties = {
      ...steel,
      density: {
        table: [
          [0, 2000],
          [100, 1000],
        ],
      },
      heatCapacity: {
        table: [
          [0, 500],
          [100, 1500],
        ],
      },
    };
    // (2000 − 10 T)(500 + 10 T) is greatest at 75 °C.
    expect(thermalCurves(material, 0).slopesBetween(0, 100).heatCapacity[1]).toBeCloseTo(1250 * 1250, 6);
  });
});

describe('a material of expressions', () => {
  const bump = '440 + 0.25*T + 4000*exp(-((T-735)/12)^2)';
  const material: Properties = {
    conductivity: { expression: '54 - 0.0333*T' },
    density: { table: [[20, 7850]] },
    heatCapacity: { expression: bump },
  };

  it('follows them within 1e-5 of their value, narrow bumps and all', () => {
    const curves = thermalCurves(material, 20);
    for (let temperature = -200; temperature < 1500; temperature += 0.37) {
      const c = 7850 * (440 + 0.25 * temperature + 4000 * Math.exp(-(((temperature - 735) / 12) ** 2)));
      expect(Math.abs(curves.heatCapacity(temperature) / c - 1)).toBeLessThan(1e-5);
      expect(Math.abs(curves.conductivity(temperature) / (54 - 0.0333 * temperature) - 1)).toBeLessThan(1e-5);
    }
    expectIntegrals(curves, 5);
  });

  it('follows a kink', () => {
    const kinked = thermalCurves({ ...material, conductivity: { expression: 'max(10, 54 - 0.0333*T)' } }, 20);
    for (let temperature = 1300; temperature < 1340; temperature += 0.01) {
      expect(Math.abs(kinked.conductivity(temperature) / Math.max(10, 54 - 0.0333 * temperature) - 1)).toBeLessThan(1e-5);
    }
  });

  it('takes few rows for a smooth one', () => {
    expect(thermalCurves({ ...steel, conductivity: { expression: '54 - 0.0333*T' } }, 20).rows.length / 13).toBeLessThanOrEqual(
      3,
    );
    const curved = { expression: '450 + 0.28*T - 2.91e-4*T^2 + 1.34e-7*T^3' };
    expect(thermalCurves({ ...steel, heatCapacity: curved }, 20).rows.length / 13).toBeLessThan(64);
  });

  it('is held where it stops being positive', () => {
    const curves = thermalCurves({ ...steel, conductivity: { expression: '45 - 0.02*T' } }, 20);
    expect(curves.conductivity(2200)).toBeCloseTo(1, 6);
    expect(curves.conductivity(2500)).toBeGreaterThan(0);
    expect(curves.conductivity(2500)).toBeLessThan(1e-3);
  });

  it('is multiplied with an expression for the density', () => {
    const both = thermalCurves({ ...material, density: { expression: '7850/(1 + 1.2e-5*(T-20))^3' } }, 20);
    const wanted = (7850 / (1 + 1.2e-5 * 480) ** 3) * (440 + 0.25 * 500 + 4000 * Math.exp(-(((500 - 735) / 12) ** 2)));
    expect(Math.abs(both.heatCapacity(500) / wanted - 1)).toBeLessThan(1e-5);
  });

  it('cannot be had where it does not hold at the start', () => {
    expect(() => thermalCurves({ ...steel, conductivity: { expression: 'T - 100' } }, 20)).toThrow(RangeError);
  });
});

describe('latent heat', () => {
  const ice: Properties = { conductivity: 2, density: 900, heatCapacity: 2000, latent: [{ heat: 334000, from: -2, to: -1 }] };

  it('over a range is spread evenly over it', () => {
    const curves = thermalCurves(ice, -20);
    expect(curves.heatCapacity(-1.5)).toBeCloseTo(900 * (2000 + 334000), 3);
    expect(curves.heatCapacity(-2.5)).toBeCloseTo(900 * 2000, 6);
    expect(curves.heatContent(0) - curves.heatContent(-3)).toBeCloseTo(900 * (3 * 2000 + 334000), 3);
    expect(curves.jumps).toEqual([]);
    expect(curves.constant).toBe(false);
  });

  it('at a point is a jump of the heat content, counted as taken up at that temperature', () => {
    const point = { ...ice, latent: [{ heat: 334000, from: 0, to: 0 }] };
    const curves = thermalCurves(point, -20);
    expect(curves.jumps).toEqual([{ temperature: 0, heat: 900 * 334000 }]);
    expect(curves.heatContent(0) - curves.heatContent(-1e-9)).toBeCloseTo(900 * 334000, 2);
    expect(curves.heatContent(-20)).toBe(0);
    expect(thermalCurves(point, 5).heatContent(5)).toBe(0);
    expect(thermalCurves(point, 5).heatContent(-5)).toBeCloseTo(-900 * (10 * 2000 + 334000), 3);
  });

  it('of several changes is taken up one after the other, and at once where two happen at one temperature', () => {
    const latent = [
      { heat: 100, from: 50, to: 50 },
      { heat: 20, from: 10, to: 10 },
      { heat: 3, from: 50, to: 50 },
      { heat: 4000, from: 20, to: 40 },
    ];
    const curves = thermalCurves({ ...ice, latent }, 0);
    expect(curves.jumps).toEqual([
      { temperature: 10, heat: 900 * 20 },
      { temperature: 50, heat: 900 * 103 },
    ]);
    expect(curves.heatContent(60)).toBeCloseTo(900 * (60 * 2000 + 4123), 3);
  });
});
