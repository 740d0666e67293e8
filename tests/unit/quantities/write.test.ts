import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  formatDuration,
  formatNumber,
  formatQuantity,
  fromDisplay,
  readQuantity,
  toDisplay,
  type QuantityKind,
} from '../../../solver/model/quantities';

describe('numbers', () => {
  it.each([
    [0, '0'],
    [-0, '0'],
    [12.5, '12.5'],
    [-26.25, '−26.25'],
    [1234567.8, '1234568'],
    [0.1 + 0.2, '0.3'],
    [0.0002, '0.0002'],
    [2e-5, '2·10⁻⁵'],
    [-3.2e-13, '−3.2·10⁻¹³'],
    [NaN, '–'],
    [Infinity, '–'],
  ])('%d is written %s', (value, text) => expect(formatNumber(value)).toBe(text));

  it('decimals, digits and a plus sign are as asked for', () => {
    expect(formatNumber(539.46, { decimals: 0 })).toBe('539');
    expect(formatNumber(5, { decimals: 2 })).toBe('5.00');
    expect(formatNumber(-0.004, { decimals: 2 })).toBe('0.00');
    expect(formatNumber(8.3333, { significant: 3 })).toBe('8.33');
    expect(formatNumber(12345.6, { significant: 3 })).toBe('12346');
    expect(formatNumber(0.1, { sign: true })).toBe('+0.1');
    expect(formatNumber(0, { sign: true })).toBe('0');
  });
});

describe('quantities', () => {
  it.each<[number, QuantityKind, string, string]>([
    [0.05715, 'length', '57.15 mm', '2.25 in'],
    [540, 'temperature', '540 °C', '1004 °F'],
    [20, 'temperatureDifference', '20 K', '36 F°'],
    [25 / 3600, 'temperatureRate', '25 K/h', '45 F°/h'],
    [1.5, 'conductivity', '1.5 W/m·K', '0.866684 BTU/h·ft·°F'],
    [2600, 'density', '2600 kg/m³', '162.313 lb/ft³'],
    [4186.8, 'heatCapacity', '4186.8 J/kg·K', '1 BTU/lb·°F'],
    [45, 'filmCoefficient', '45 W/m²·K', '7.92496 BTU/h·ft²·°F'],
    [-550, 'heatFlux', '−0.55 kW/m²', '−174.349 BTU/h·ft²'],
    [0.004, 'contactResistance', '0.004 m²·K/W', '0.0227131 h·ft²·°F/BTU'],
    [0.85, 'fraction', '0.85', '0.85'],
    [5400, 'time', '1 h 30 min', '1 h 30 min'],
  ])('%d of %s is %s, or %s', (value, kind, si, us) => {
    expect(formatQuantity(value, kind, 'SI').text).toBe(si);
    expect(formatQuantity(value, kind, 'US').text).toBe(us);
  });

  it('number and unit come apart for tables', () => {
    expect(formatQuantity(-12.3, 'temperatureDifference', 'SI', { decimals: 0 })).toEqual({
      number: '−12',
      unit: 'K',
      text: '−12 K',
    });
  });
});

describe('durations', () => {
  it.each([
    [0, '0 s'],
    [0.42, '0.42 s'],
    [42, '42 s'],
    [59.7, '1 min 00 s'],
    [305, '5 min 05 s'],
    [599.4, '9 min 59 s'],
    [599.7, '10 min'],
    [2730, '46 min'],
    [3599, '1 h 00 min'],
    [100800, '28 h 00 min'],
    [4 * 86400 - 60, '95 h 59 min'],
    [4 * 86400, '4 d 00 h'],
    [400000, '4 d 15 h'],
    [-1320, '−22 min'],
    [NaN, '–'],
  ])('%d s reads %s', (seconds, text) => expect(formatDuration(seconds)).toBe(text));

  it('a margin shows its plus sign', () => expect(formatDuration(1320, { sign: true })).toBe('+22 min'));

  it.each([
    [2730, '45 min 30 s'],
    [59.7, '59.7 s'],
    [400000, '4 d 15 h 6 min 40 s'],
    [100800, '28 h 00 min'],
  ])('%d s written out is %s', (seconds, text) => expect(formatQuantity(seconds, 'time', 'SI').text).toBe(text));
});

const magnitudes: [QuantityKind, number, number][] = [
  ['length', 1e-5, 20],
  ['temperatureDifference', 1e-3, 3000],
  ['time', 1e-2, 1e7],
  ['conductivity', 0.01, 500],
  ['density', 1, 20000],
  ['heatCapacity', 100, 10000],
  ['filmCoefficient', 0.1, 1e5],
  ['heatFlux', 0.1, 1e7],
  ['contactResistance', 1e-6, 10],
  ['temperatureRate', 1e-5, 1000],
  ['fraction', 1e-3, 1],
];

describe('what is written reads back as the same', () => {
  it.each(magnitudes)('%s', (kind, smallest, largest) => {
    const sizes = fc.double({ min: Math.log(smallest), max: Math.log(largest), noNaN: true }).map(Math.exp);
    fc.assert(
      fc.property(sizes, fc.constantFrom('SI' as const, 'US' as const), fc.boolean(), (size, system, below) => {
        const value = below && kind !== 'fraction' ? -size : size;
        const reading = readQuantity(formatQuantity(value, kind, system).text, kind, system);
        expect(reading.kind).toBe('value');
        if (reading.kind === 'value') expect(Math.abs(reading.value - value)).toBeLessThanOrEqual(1e-5 * size);
      }),
      { seed: 20261201 },
    );
  });

  it('temperature, in both systems', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -273.14, max: 3000, noNaN: true }),
        fc.constantFrom('SI' as const, 'US' as const),
        (value, system) => {
          const reading = readQuantity(formatQuantity(value, 'temperature', system).text, 'temperature', system);
          expect(reading.kind).toBe('value');
          if (reading.kind === 'value') expect(Math.abs(reading.value - value)).toBeLessThanOrEqual(0.01);
        },
      ),
      { seed: 20261201 },
    );
  });

  it('the unit shown and back is the identity, for every kind', () => {
    fc.assert(
      fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), (value) => {
        for (const [kind] of [...magnitudes, ['temperature'] as [QuantityKind]]) {
          for (const system of ['SI', 'US'] as const) {
            expect(Math.abs(fromDisplay(toDisplay(value, kind, system), kind, system) - value)).toBeLessThanOrEqual(
              1e-9 + 1e-13 * Math.abs(value),
            );
          }
        }
      }),
      { seed: 20261201 },
    );
  });
});

describe('any text at all', () => {
  it('gets an answer, never an exception, and never a value that is not finite', () => {
    const pieces = fc.constantFrom(
      '1',
      '2,5',
      '1,234',
      ' ',
      'W',
      '/',
      '(',
      ')',
      'm',
      '°',
      'F',
      'K',
      '-',
      '−',
      '·',
      'h',
      ':',
      '1/2',
      '%',
      'e9',
      '²',
      'BTU',
      '^',
    );
    const texts = fc.oneof(
      fc.string({ maxLength: 70 }),
      fc.array(pieces, { maxLength: 12 }).map((list) => list.join('')),
    );
    fc.assert(
      fc.property(texts, fc.constantFrom(...magnitudes.map(([kind]) => kind), 'temperature' as const), (text, kind) => {
        const reading = readQuantity(text, kind, 'US');
        if (reading.kind === 'value') expect(Number.isFinite(reading.value)).toBe(true);
        if (reading.kind === 'refused') expect(reading.message).not.toBe('');
        if (reading.kind === 'partial') expect(reading.hint).not.toBe('');
        if (reading.kind === 'choice') expect(new Set(reading.choices.map(({ value }) => value)).size).toBe(2);
      }),
      { seed: 20261201, numRuns: 2000 },
    );
  });
});
