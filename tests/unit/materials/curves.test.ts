import { describe, expect, it } from 'vitest';
import { constantCurves } from '../../../solver/materials';

const steel = { id: 'm', name: 'Steel', conductivity: 45, density: 7850, heatCapacity: 500 };

describe('a material with constant properties', () => {
  const curves = constantCurves(steel, 20);

  it('holds no heat and conducts nothing at its reference temperature', () => {
    expect(curves.heatContent(20)).toBe(0);
    expect(curves.conductionIntegral(20)).toBe(0);
  });

  it('holds ρ c for every kelvin, and conducts k', () => {
    expect(curves.heatContent(21)).toBe(7850 * 500);
    expect(curves.conductionIntegral(21)).toBe(45);
    expect(curves.heatContent(0)).toBe(-20 * 7850 * 500);
  });

  it('has the slopes of its integrals at any temperature', () => {
    for (const temperature of [-200, 20, 1500]) {
      expect(curves.heatContent(temperature + 1) - curves.heatContent(temperature)).toBeCloseTo(
        curves.heatCapacity(temperature),
        3,
      );
      expect(curves.conductionIntegral(temperature + 1) - curves.conductionIntegral(temperature)).toBeCloseTo(
        curves.conductivity(temperature),
        9,
      );
    }
    expect(curves.constant).toBe(true);
  });
});
