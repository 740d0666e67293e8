import { describe, expect, it } from 'vitest';
import { MAX_TYPED, readQuantity, type QuantityKind, type UnitSystem } from '../../../solver/model/quantities';

const read = (text: string, kind: QuantityKind, system: UnitSystem = 'SI') => readQuantity(text, kind, system);
const expectValue = (text: string, kind: QuantityKind, value: number, system: UnitSystem = 'SI'): void => {
  const reading = read(text, kind, system);
  expect(reading, text).toMatchObject({ kind: 'value' });
  if (reading.kind === 'value') expect(reading.value, text).toBeCloseTo(value, 10);
};

describe('lengths', () => {
  it.each([
    ['2 in', 0.0508],
    ['2in', 0.0508],
    ['2"', 0.0508],
    ['2 1/4 in', 0.05715],
    ['2-1/4 in', 0.05715],
    ['2¼ in', 0.05715],
    ['2¼"', 0.05715],
    ['1/4 in.', 0.00635],
    ['5 ft 3 in', 1.6002],
    ["5' 3 1/2″", 1.6129],
    ['5\'-3"', 1.6002],
    ['2 ft 3', 0.6858],
    ['1 m 20 cm', 1.2],
    ['150', 0.15],
    ['150 mm', 0.15],
    ['150 MM', 0.15],
    ['12,5 mm', 0.0125],
    ['1 234,5 mm', 1.2345],
    ['1\u202f234.5\u00a0mm', 1.2345],
    ['1.234,5 mm', 1.2345],
    ['1,234.5 mm', 1.2345],
    ['1,234,567 mm', 1234.567],
    ['0,125 mm', 0.000125],
    ['−3 mm', -0.003],
    ['-3 mm', -0.003],
    ['3e-4 m', 0.0003],
    ['3·10⁻⁴ m', 0.0003],
    ['20 µm', 2e-5],
    ['20 μm', 2e-5],
    ['0.1 km', 100],
    ['3 thou', 7.62e-5],
  ])('%s is %d m', (text, value) => expectValue(text, 'length', value));

  it('a bare number is in the unit shown', () => {
    expectValue('2', 'length', 0.002, 'SI');
    expectValue('2', 'length', 0.0508, 'US');
    expectValue('2 1/4', 'length', 0.05715, 'US');
  });

  it('says what it understood in the unit shown', () => {
    expect(read('3 in', 'length')).toMatchObject({ echo: '76.2 mm' });
    expect(read('76.2 mm', 'length', 'US')).toMatchObject({ echo: '3 in' });
  });

  it('asks what a comma before three digits means, and only there', () => {
    expect(read('1,234', 'length')).toEqual({
      kind: 'choice',
      choices: [
        { text: '1.234 mm', value: 0.001234 },
        { text: '1234 mm', value: 1.234 },
      ],
    });
    expect(read('-1,234 in', 'length')).toMatchObject({ choices: [{ text: '−1.234 in' }, { text: '−1234 in' }] });
    for (const text of ['1,23', '0,234', '1,2345', '1234,567', '1.234']) expect(read(text, 'length').kind, text).toBe('value');
  });

  it('parts of a sum must get smaller, and stay below one of the part before', () => {
    for (const text of ['3 in 5 ft', '5 ft 14 in', '5 ft 3 ft', '5 ft 3 kg'])
      expect(read(text, 'length').kind, text).toBe('refused');
  });
});

describe('temperatures and differences', () => {
  it.each([
    ['350 degF', 176.666666666667],
    ['350 deg F', 176.666666666667],
    ['350 °F', 176.666666666667],
    ['350F', 176.666666666667],
    ['20 ℃', 20],
    ['20 ° C', 20],
    ['20 ºC', 20],
    ['500 degrees Celsius', 500],
    ['293,15 K', 20],
    ['300 k', 26.85],
    ['−40 °F', -40],
  ])('%s is %d °C', (text, value) => expectValue(text, 'temperature', value));

  it('a degree without its scale is not a temperature yet', () => {
    for (const text of ['350 deg', '350°', '350 °', '350 d', '350 degrees']) {
      expect(read(text, 'temperature')).toEqual({ kind: 'partial', hint: '°C, °F or K?' });
    }
  });

  it('a difference is not taken for a temperature', () => {
    expect(read('35 F°', 'temperature')).toEqual({
      kind: 'refused',
      message: '"35 F°" is a temperature difference. Try 35 °F.',
    });
  });

  it('either spelling of a degree is a difference where a difference is asked for, without an offset', () => {
    for (const text of ['36 F°', '36 °F', '36 degF', '20 K', '20 °C', '20 C°']) expectValue(text, 'temperatureDifference', 20);
    expectValue('5 mK', 'temperatureDifference', 0.005);
    expect(read('36 F°', 'temperatureDifference')).toMatchObject({ echo: '20 K' });
    expect(read('20 K', 'temperatureDifference', 'US')).toMatchObject({ echo: '36 F°' });
  });

  it('nothing lies below absolute zero', () => {
    expect(read('-300', 'temperature')).toEqual({ kind: 'refused', message: '"-300" lies below absolute zero, −273.15 °C.' });
    expect(read('-300', 'temperature', 'US').kind).toBe('value');
    expect(read('-500', 'temperature', 'US')).toMatchObject({ message: '"-500" lies below absolute zero, −459.67 °F.' });
    expectValue('-300 K', 'temperatureDifference', -300);
  });

  it.each([
    ['25 K/h', 25 / 3600],
    ['45 F/h', 25 / 3600],
    ['45 °F/h', 25 / 3600],
    ['45 F°/hr', 25 / 3600],
    ['45 degF per hour', 25 / 3600],
    ['10 °C/min', 1 / 6],
    ['3 mK/s', 0.003],
    ['25', 25 / 3600],
  ])('%s is a rate of %d K/s', (text, value) => expectValue(text, 'temperatureRate', value));
});

describe('times', () => {
  it.each([
    ['1 h 30 min', 5400],
    ['1h30', 5400],
    ['1 h 30', 5400],
    ['90 min', 5400],
    ['90 m', 5400],
    ['1.5 h', 5400],
    ['1,5 h', 5400],
    ['1 1/2 h', 5400],
    ['1½ hours', 5400],
    ['1:30', 5400],
    ['1:30:15', 5415],
    ['0:00:20', 20],
    ['20 s', 20],
    ['2 d 4 h', 187200],
    ['1 week', 604800],
    ['8', 28800],
    ['−5 min 30 s', -330],
    ['28 h 00 min', 100800],
  ])('%s is %d s', (text, value) => expectValue(text, 'time', value));

  it('"8 k" is refused with something to try', () => {
    expect(read('8 k', 'time')).toEqual({ kind: 'refused', message: '"8 k" is not a time. Try 8 h.' });
  });

  it('a clock time needs two digits of minutes below 60', () => {
    expect(read('1:', 'time').kind).toBe('partial');
    expect(read('1:3', 'time').kind).toBe('partial');
    expect(read('1:75', 'time')).toMatchObject({ kind: 'refused' });
    expect(read('1:30', 'length').kind).toBe('refused');
  });
});

describe('compound units', () => {
  it.each([
    ['1.5 W/(m K)', 1.5],
    ['1.5 W/(m·K)', 1.5],
    ['1.5 W/m/K', 1.5],
    ['1.5 W/m K', 1.5],
    ['1.5 W/mK', 1.5],
    ['1.5 W/m·K', 1.5],
    ['1.5 W m⁻¹ K⁻¹', 1.5],
    ['1.5 W m-1 K-1', 1.5],
    ['1.5 W/(m °C)', 1.5],
    ['1500 mW/(m K)', 1.5],
    ['1 BTU/(hr ft degF)', 1.7307346663714],
    ['1 BTU/hr ft degF', 1.7307346663714],
    ['1 BTU in/(hr ft2 degF)', 0.1442278888643],
    ['1 BTU-in/hr-ft²-°F', 0.1442278888643],
    ['1 kcal/(m h °C)', 1.163],
    ['1.5', 1.5],
  ])('%s is a conductivity of %d W/(m·K)', (text, value) => expectValue(text, 'conductivity', value));

  it.each<[string, QuantityKind, number]>([
    ['45 W/m2K', 'filmCoefficient', 45],
    ['45 W/m²·K', 'filmCoefficient', 45],
    ['2.5 kW/m2', 'heatFlux', 2500],
    ['2.5', 'heatFlux', 2500],
    ['−0.55 kW/m²', 'heatFlux', -550],
    ['0.004 m2K/W', 'contactResistance', 0.004],
    ['0.004 K m²/W', 'contactResistance', 0.004],
    ['2·10⁻⁵', 'contactResistance', 2e-5],
    ['0.5 kJ/kgK', 'heatCapacity', 500],
    ['500 J/(kg K)', 'heatCapacity', 500],
    ['0.5 J/gK', 'heatCapacity', 500],
    ['2.6 g/cm3', 'density', 2600],
    ['2.6 t/m³', 'density', 2600],
    ['2.6 kg/l', 'density', 2600],
  ])('%s as %s is %d', (text, kind, value) => expectValue(text, kind, value));

  it('capitals of a prefix are kept apart: milliwatt, megawatt, and neither', () => {
    expectValue('3 mW/m2', 'heatFlux', 0.003);
    expectValue('3 MW/m2', 'heatFlux', 3e6);
    expect(read('3 mw/m2', 'heatFlux')).toEqual({ kind: 'partial', hint: 'MW/m²?' });
  });

  it('a unit of another kind is refused', () => {
    for (const text of ['1 W/(m2 K)', '1 kg', '1 m', '1 W/(m degF2)'])
      expect(read(text, 'conductivity').kind, text).not.toBe('value');
    expect(read('8 kg', 'length')).toEqual({ kind: 'refused', message: '"8 kg" is not a length. Try 8 mm.' });
    expect(read('1 m', 'conductivity').kind).toBe('refused');
  });

  it('nothing typed is evaluated', () => {
    for (const text of ['2 evaluate(1)', '1 constructor', '1 __proto__', '2 toString', '1+1', '2*(3)', '1 import']) {
      expect(read(text, 'conductivity').kind, text).not.toBe('value');
    }
  });
});

describe('fractions', () => {
  it('are read as number, fraction or percent', () => {
    for (const text of ['0.35', '.35', '0,35', '35 %', '35%', '35 percent', '7/20']) expectValue(text, 'fraction', 0.35);
  });
  it('lie between 0 and 1', () => {
    expect(read('35', 'fraction')).toEqual({ kind: 'refused', message: '"35" is not between 0 and 1. Try 35 %.' });
    expect(read('120 %', 'fraction')).toEqual({ kind: 'refused', message: '"120 %" is not between 0 and 1.' });
    expect(read('−0.1', 'fraction').kind).toBe('refused');
    expectValue('1', 'fraction', 1);
  });
});

describe('while typing', () => {
  it.each<[string, QuantityKind, string]>([
    ['', 'length', 'A length, such as 25 mm'],
    ['-', 'temperature', 'A temperature, such as 540 °C'],
    ['.', 'length', 'A length, such as 25 mm'],
    ['2 1/', 'length', 'A length, such as 25 mm'],
    ['3e-', 'length', 'A length, such as 25 mm'],
    ['2 i', 'length', 'in?'],
    ['1.5 W', 'conductivity', 'W/m·K?'],
    ['1.5 W/(m', 'conductivity', 'W/m·K?'],
    ['1 BTU/(hr ft', 'conductivity', 'BTU/h·ft·°F?'],
    ['25 K/', 'temperatureRate', 'K/h, K/min or K/s?'],
  ])('"%s" is the beginning of a %s', (text, kind, hint) => expect(read(text, kind)).toEqual({ kind: 'partial', hint }));

  it('no beginning of a good text is refused', () => {
    const good: [string, QuantityKind][] = [
      ['2 1/4 in', 'length'],
      ['25.4 mm', 'length'],
      ['350 degF', 'temperature'],
      ['-40 °C', 'temperature'],
      ['1 h 30 min', 'time'],
      ['1:30:15', 'time'],
      ['1.5 W/(m K)', 'conductivity'],
      ['BTU in/(hr ft2 degF)', 'conductivity'],
      ['2.5 kW/m2', 'heatFlux'],
      ['0.004 m2 K/W', 'contactResistance'],
      ['15 F°/h', 'temperatureRate'],
      ['35 %', 'fraction'],
    ];
    for (const [text, kind] of good) {
      const whole = text.startsWith('B') ? `1 ${text}` : text;
      for (let length = 1; length <= whole.length; length++) {
        const beginning = whole.slice(0, length);
        // 2 and more are no fractions until the sign follows; said at once, as it stands.
        if (kind === 'fraction' && length < whole.length) continue;
        expect(read(beginning, kind).kind, beginning).not.toBe('refused');
      }
    }
  });

  it('text that goes on for ever is not looked at', () => {
    expect(read('1'.repeat(MAX_TYPED + 1), 'length')).toEqual({
      kind: 'refused',
      message: 'This is too long: at most 60 characters.',
    });
  });
});

describe('nonsense', () => {
  it.each(['abc', '1/0 in', '1..2', '1,2,3', '--1', '1 mm mm', '5 %', '∞', 'NaN', 'Infinity', '1e999 m'])(
    '"%s" is no length',
    (text) => {
      const reading = read(text, 'length');
      expect(reading.kind).toBe('refused');
      if (reading.kind === 'refused') expect(reading.message).toContain(text);
    },
  );
});
