import { describe, expect, it } from 'vitest';
import { curveInWords, expressionRefusal, readTable, tableText, type TableLimits } from '../../../app/ui';

const LIMITS: TableLimits = { least: 1, most: 3, x: { bound: -273.15, open: true }, y: { bound: 0, open: true } };
const read = (text: string) => readTable(text, 'temperature', 'conductivity', 'SI', LIMITS);

describe('a table as text', () => {
  it('comes back as it was, in either system of units', () => {
    const points: [number, number][] = [
      [20, 45],
      [400, 38.5],
    ];
    expect(read(tableText(points, 'temperature', 'conductivity', 'SI'))).toEqual({ kind: 'table', points });
    const us = readTable(tableText(points, 'temperature', 'conductivity', 'US'), 'temperature', 'conductivity', 'US', LIMITS);
    if (us.kind !== 'table') throw new Error(us.message);
    us.points.forEach(([x, y], index) => {
      expect(x).toBeCloseTo(points[index][0], 6);
      expect(y).toBeCloseTo(points[index][1], 6);
    });
  });

  it('may be pasted with tabs, spaces, or a minus sign of print', () => {
    expect(read('−20\t1.5\r\n100 1.2\n')).toEqual({
      kind: 'table',
      points: [
        [-20, 1.5],
        [100, 1.2],
      ],
    });
  });

  it('is refused with the row at fault', () => {
    expect(read('')).toEqual({ kind: 'refused', message: 'A table needs at least one row.' });
    expect(read('20 1\n30')).toEqual({ kind: 'refused', message: 'Row 2, “30”, is not two numbers.' });
    expect(read('20 1\n20 2')).toMatchObject({ message: expect.stringMatching(/^Row 2: the first number must be more/) });
    expect(read('20 0')).toMatchObject({ message: expect.stringMatching(/^Row 1: 0 W\/m·K must be more than 0/) });
    expect(read('-300 1')).toMatchObject({ message: expect.stringMatching(/must be more than −273/) });
    expect(read('1 1\n2 1\n3 1\n4 1')).toEqual({ kind: 'refused', message: 'A table has at most 3 rows, got 4.' });
  });
});

it('curves are said in words', () => {
  expect(curveInWords(5, 'SI')).toBe('');
  expect(curveInWords({ table: [[20, 1]] }, 'SI')).toBe('table, 1 point');
  expect(curveInWords({ expression: '2*T' }, 'SI')).toBe('2*T');
  expect(curveInWords({ correlation: 'forcedCylinder', fluid: 'water', length: 1, velocity: 1 }, 'SI')).toBe(
    'forced, across a cylinder, water',
  );
  expect(curveInWords({ segments: [{ hold: 5 }] }, 'SI')).toBe('1 segment');
});

it('an expression is refused in the words of its reader', () => {
  expect(expressionRefusal('2*T', ['T'])).toBeNull();
  expect(expressionRefusal('2*', ['T'])).toMatch(/cannot be read as an expression of T/);
  expect(expressionRefusal('random(1)', ['T'])).toMatch(/does not know the function "random"/);
});
