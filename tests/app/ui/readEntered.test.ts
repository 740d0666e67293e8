import { describe, expect, it } from 'vitest';
import { readEntered, shownInCell, shownNumber } from '../../../app/ui/readEntered';

const thickness = { name: 'Thickness', quantity: 'length' as const, bounds: { above: 0 } };
const contact = { name: 'Contact', quantity: 'contactResistance' as const, bounds: { atLeast: 0 }, zero: 'bonded' };

describe('a typed quantity', () => {
  it('keeps its text where that carries the unit', () => {
    expect(readEntered('3 in', thickness, 'SI')).toEqual({
      state: 'value',
      entered: { value: 0.0762, text: '76.2 mm', typed: '3 in' },
    });
  });

  it('does not keep a bare number, which other units would read differently', () => {
    expect(readEntered('75', thickness, 'SI')).toEqual({ state: 'value', entered: { value: 0.075, text: '75 mm' } });
  });

  it('is refused beyond its bound, with the bound and what was got', () => {
    expect(readEntered('-5 mm', thickness, 'SI')).toEqual({
      state: 'refused',
      message: 'Thickness must be more than 0 mm, got −5 mm.',
    });
    expect(readEntered('0', thickness, 'US')).toMatchObject({ message: 'Thickness must be more than 0 in, got 0 in.' });
  });

  it('that has two readings is asked about', () => {
    const reading = readEntered('1,234', thickness, 'SI');
    expect(reading).toMatchObject({ state: 'choice' });
    expect(reading.state === 'choice' && reading.choices.map(({ entered }) => entered.value)).toEqual([0.001234, 1.234]);
  });

  it('that has only begun says what could follow', () => expect(readEntered('', thickness, 'SI').state).toBe('partial'));

  it('zero has a word of its own where the field has one', () => {
    expect(readEntered('bonded', contact, 'SI')).toEqual({ state: 'value', entered: { value: 0, text: 'bonded' } });
    expect(shownNumber(0, contact, 'SI').text).toBe('bonded');
    expect(shownNumber(0.004, contact, 'SI').text).toBe('0.004 m²·K/W');
  });
});

describe('a number in a cell', () => {
  it('is shown in full where it is short, and rounded where it comes from a conversion', () => {
    expect(shownInCell(0.0254 * 12.0625, thickness, 'US').text).toBe('12.06 in');
    expect(shownInCell(0.0254 * 3.125, thickness, 'US').text).toBe('3.125 in');
    expect(shownInCell(0.16, thickness, 'US').text).toBe('6.299 in');
    expect(shownInCell(0.1525, thickness, 'SI').text).toBe('152.5 mm');
    expect(shownInCell(1234.5, { name: 'Density', quantity: 'density' }, 'SI').text).toBe('1234.5 kg/m³');
  });

  it('keeps a time whole', () =>
    expect(shownInCell(123456, { name: 'Time', quantity: 'time' }, 'SI').text).toBe('34 h 17 min 36 s'));
});
