import { create, unitDependencies } from 'mathjs';
import { describe, expect, it } from 'vitest';
import {
  displayUnit,
  fromDisplay,
  readQuantity,
  toDisplay,
  type QuantityKind,
  type UnitSystem,
} from '../../../solver/model/quantities';

const valueOf = (text: string, kind: QuantityKind): number => {
  const reading = readQuantity(text, kind, 'SI');
  if (reading.kind !== 'value') throw new Error(`${text}: ${JSON.stringify(reading)}`);
  return reading.value;
};

/**
 * Factors to SI units of NIST Special Publication 811 (2008), Appendix B.8, "Factors for units listed alphabetically", to the
 * seven digits printed there; quoted from memory. Btu and calorie are those of the International Table.
 */
const SP_811: [string, QuantityKind, number][] = [
  ['1 Btu·ft/(h·ft²·°F)', 'conductivity', 1.730735],
  ['1 Btu·in/(h·ft²·°F)', 'conductivity', 1.442279e-1],
  ['1 Btu·in/(s·ft²·°F)', 'conductivity', 5.192204e2],
  ['1 cal/(cm·s·°C)', 'conductivity', 4.1868e2],
  ['1 Btu/(h·ft²·°F)', 'filmCoefficient', 5.678263],
  ['1 Btu/(s·ft²·°F)', 'filmCoefficient', 2.044175e4],
  ['1 Btu/(ft²·h)', 'heatFlux', 3.154591],
  ['1 Btu/(ft²·s)', 'heatFlux', 1.135653e4],
  ['1 W/in²', 'heatFlux', 1.550003e3],
  ['1 °F·h·ft²/Btu', 'contactResistance', 1.761102e-1],
  ['1 Btu/(lb·°F)', 'heatCapacity', 4.1868e3],
  ['1 cal/(g·K)', 'heatCapacity', 4.1868e3],
  ['1 lb/ft³', 'density', 1.601846e1],
  ['1 lb/in³', 'density', 2.76799e4],
  ['1 g/cm³', 'density', 1e3],
  ['1 in', 'length', 2.54e-2],
  ['1 ft', 'length', 3.048e-1],
  ['1 mil', 'length', 2.54e-5],
  ['1 yd', 'length', 9.144e-1],
  ['1 °F', 'temperatureDifference', 5.555556e-1],
  ['1 °R', 'temperatureDifference', 5.555556e-1],
  ['1 d', 'time', 8.64e4],
];

describe('unit factors', () => {
  it.each(SP_811)('%s as a %s is what NIST SP 811 gives', (text, kind, factor) => {
    expect(valueOf(text, kind) / factor).toBeCloseTo(1, 6);
  });

  it.each([
    ['32 °F', 0],
    ['212 °F', 100],
    ['−40 °F', -40],
    ['−459.67 °F', -273.15],
    ['0 K', -273.15],
    ['273.15 K', 0],
    ['491.67 °R', 0],
  ])('%s is %d °C (definitions of the scales, NIST SP 811, Appendix B.1.2; from memory)', (text, celsius) => {
    expect(valueOf(text, 'temperature')).toBeCloseTo(celsius, 10);
  });

  it.each<[QuantityKind, UnitSystem, string, string]>([
    ['length', 'SI', 'mm', 'm'],
    ['length', 'US', 'in', 'm'],
    ['time', 'SI', 'hour', 's'],
    ['temperatureDifference', 'US', 'degR', 'K'],
    ['conductivity', 'US', 'BTU/(hour*ft*degR)', 'W/(m*K)'],
    ['density', 'US', 'lb/ft^3', 'kg/m^3'],
    ['heatCapacity', 'US', 'BTU/(lb*degR)', 'J/(kg*K)'],
    ['filmCoefficient', 'US', 'BTU/(hour*ft^2*degR)', 'W/(m^2*K)'],
    ['heatFlux', 'SI', 'kW/m^2', 'W/m^2'],
    ['heatFlux', 'US', 'BTU/(hour*ft^2)', 'W/m^2'],
    ['contactResistance', 'US', 'hour*ft^2*degR/BTU', 'm^2*K/W'],
    ['temperatureRate', 'SI', 'K/hour', 'K/s'],
    ['temperatureRate', 'US', 'degR/hour', 'K/s'],
  ])('the shown unit of a %s in %s has the size of %s in the units of mathjs', (kind, system, unit, stored) => {
    const math = create({ unitDependencies });
    expect(fromDisplay(1, kind, system) / math.unit(1, unit).toNumber(stored)).toBeCloseTo(1, 12);
  });

  it('every unit shown reads back as itself, through our table and through the unit parser', () => {
    const kinds: QuantityKind[] = [
      'length',
      'temperatureDifference',
      'conductivity',
      'density',
      'heatCapacity',
      'filmCoefficient',
    ];
    const more: QuantityKind[] = ['heatFlux', 'contactResistance', 'temperatureRate', 'time'];
    for (const kind of [...kinds, ...more]) {
      for (const system of ['SI', 'US'] as const) {
        const unit = displayUnit(kind, system);
        expect(valueOf(`3 ${unit}`, kind)).toBeCloseTo(fromDisplay(3, kind, system), 9);
        const spelled = unit
          .replace(/^([^/]*)\/(.*)$/, '$1/($2)')
          .replaceAll('·', ' ')
          .replaceAll('BTU', 'Btu')
          .replaceAll('²', '^2');
        expect(valueOf(`3 ${spelled}`, kind) / fromDisplay(3, kind, system)).toBeCloseTo(1, 12);
      }
    }
  });

  it('a temperature has an offset and a difference has none', () => {
    expect(toDisplay(0, 'temperature', 'US')).toBeCloseTo(32, 12);
    expect(toDisplay(0, 'temperatureDifference', 'US')).toBe(0);
    expect(toDisplay(100, 'temperature', 'US') - toDisplay(90, 'temperature', 'US')).toBeCloseTo(18, 12);
    expect(toDisplay(10, 'temperatureDifference', 'US')).toBeCloseTo(18, 12);
  });
});
