import { describe, expect, it } from 'vitest';
import {
  boxOf,
  piecesBeyond,
  placeLetters,
  placeLineLabel,
  placePeakLabel,
  tabSeparated,
  timeInWords,
  valueAxis,
  type Box,
} from '../../../app/draw';
import { toDisplay } from '../../../solver/model/quantities';

const labels = (low: number, high: number, height: number, system: 'SI' | 'US' = 'SI'): string[] =>
  valueAxis(low, high, height, 0, 'temperature', system).ticks.map((tick) => tick.label);

describe('valueAxis', () => {
  it('ends on round values and thins its ticks to the height', () => {
    expect(labels(25, 550, 48)).toEqual(['0', '300', '600']);
    expect(labels(25, 550, 85)).toEqual(['0', '200', '400', '600']);
    expect(labels(25, 550, 240)).toEqual(['0', '100', '200', '300', '400', '500', '600']);
  });

  it('takes the round values of the unit on screen, not of the stored one', () => {
    const axis = valueAxis(20, 860, 250, 0, 'temperature', 'US');
    expect(axis.ticks.map((tick) => tick.label)).toEqual(['0', '200', '400', '600', '800', '1000', '1200', '1400', '1600']);
    for (const tick of axis.ticks) expect(toDisplay(tick.value, 'temperature', 'US')).toBeCloseTo(Number(tick.label), 9);
  });

  it('holds all values between its ends, and writes a true minus', () => {
    const { scale, ticks } = valueAxis(-37, 4, 100, 0, 'temperature', 'SI');
    expect(scale.at(-37)).toBeLessThanOrEqual(100);
    expect(scale.at(4)).toBeGreaterThanOrEqual(0);
    expect(ticks.some(({ label }) => label.startsWith('−'))).toBe(true);
  });

  it('gives a flat course room on both sides', () => {
    const { scale } = valueAxis(25, 25, 60, 0, 'temperature', 'SI');
    expect(scale.at(25)).toBeGreaterThan(5);
    expect(scale.at(25)).toBeLessThan(55);
  });

  it('never has more ticks than fit', () => {
    for (let height = 24; height < 300; height += 7) {
      for (const high of [3, 47, 110, 550, 1234]) {
        const count = labels(0, high, height).length;
        expect(count, `${high} on ${height} px`).toBeLessThanOrEqual(Math.floor(height / 20) + 1);
        expect(count, `${high} on ${height} px`).toBeGreaterThan(1);
      }
    }
  });
});

describe('words in a plot', () => {
  const columns = Array.from({ length: 41 }, (_, i) => i * 10);
  const rising = columns.map((x) => 100 - x / 4);
  const size = { width: 60, height: 12 };
  const clearOf = (box: Box, curve: readonly number[]): boolean =>
    columns.every((x, i) => x < box.x || x > box.x + box.width || curve[i] < box.y || curve[i] > box.y + box.height);

  it('stand on a limit where no curve runs through them', () => {
    const near = columns.map((x) => (x > 200 ? 44 : 90));
    const label = placeLineLabel({ from: 0, to: 400, y: 50 }, size, { columns, curves: [near], bottom: 100 });
    expect(clearOf(boxOf(label, size), near)).toBe(true);
  });

  it('stay inside the plot and off words that are there already', () => {
    const taken: Box[] = [{ x: 300, y: 30, width: 100, height: 40 }];
    const label = placeLineLabel({ from: 0, to: 400, y: 50 }, size, { columns, curves: [], bottom: 100, taken });
    expect(label.anchor).toBe('start');
    const top = placeLineLabel({ from: 0, to: 400, y: 2 }, size, { columns, curves: [], bottom: 100 });
    expect(boxOf(top, size).y).toBeGreaterThanOrEqual(0);
  });

  it('stand beside a peak, on its left near the right edge', () => {
    const drawn = { columns, curves: [rising], bottom: 110 };
    const middle = placePeakLabel({ x: 200, y: 50, up: true, beyond: 50, right: 400 }, size, drawn);
    const level = columns.map(() => 80);
    const end = placePeakLabel({ x: 395, y: 80, up: true, beyond: 80, right: 400 }, size, { ...drawn, curves: [level] });
    expect(middle?.anchor).toBe('end');
    expect(end?.anchor).toBe('end');
    expect(middle !== null && clearOf(boxOf(middle, size), rising)).toBe(true);
  });

  it('are left out where a curve would run through them everywhere', () => {
    const curves = Array.from({ length: 12 }, (_, k) => columns.map(() => 5 + 8 * k));
    expect(
      placePeakLabel({ x: 200, y: 50, up: true, beyond: 50, right: 400 }, size, { columns, curves, bottom: 100 }),
    ).toBeNull();
  });
});

describe('placeLetters', () => {
  const x = Array.from({ length: 50 }, (_, i) => i * 10);

  it('puts each letter on its own curve, clear of the others', () => {
    const curves = [x.map((v) => 100 - v / 10), x.map((v) => 100 - v / 6), x.map(() => 100)];
    const letters = placeLetters(x, curves);
    letters.forEach((letter, k) => {
      expect(letter).not.toBeNull();
      if (letter === null) return;
      expect(letter.y).toBe(curves[k][letter.column]);
      curves.forEach((other, j) => j !== k && expect(Math.abs(other[letter.column] - letter.y)).toBeGreaterThan(12));
    });
  });

  it('keeps letters of equal curves apart along the axis', () => {
    const same = x.map(() => 50);
    const [a, b] = placeLetters(x, [same, same]);
    expect(Math.abs((a?.x ?? 0) - (b?.x ?? 0))).toBeGreaterThan(17);
  });

  it('keeps off words, and gives none to a curve without values', () => {
    const avoid = [{ x: 0, y: 40, width: 300, height: 20 }];
    const [letter] = placeLetters(x, [x.map(() => 50)], [], avoid);
    expect(letter?.x).toBeGreaterThan(300);
    expect(placeLetters(x, [x.map(() => Number.NaN)])).toEqual([null]);
  });
});

describe('piecesBeyond', () => {
  it('cuts a curve where it crosses the limit', () => {
    const curve = { time: [0, 10, 20, 30], value: [0, 20, 20, 0] };
    expect(piecesBeyond(curve, 10, 1)).toEqual([{ time: [5, 10, 20, 25], value: [10, 20, 20, 10] }]);
    expect(piecesBeyond(curve, 10, -1)).toEqual([
      { time: [0, 5], value: [0, 10] },
      { time: [25, 30], value: [10, 0] },
    ]);
    expect(piecesBeyond(curve, 20, 1)).toEqual([]);
  });
});

describe('timeInWords', () => {
  it('is as precise as the window shows it', () => {
    expect(timeInWords(139_243, 216_000)).toBe('38 h 40 min');
    expect(timeInWords(5_413, 400)).toBe('1 h 30 min 13 s');
    expect(timeInWords(0, 216_000)).toBe('0 s');
  });
});

describe('tabSeparated', () => {
  it('keeps heads, leaves gaps empty, and lets no cell break out of its place', () => {
    const table = {
      caption: '',
      columns: ['Time, h', 'A\tFace, °C'],
      rows: [
        [0, 1 / 3],
        ['x\ny', null],
        [1, Number.NaN],
      ],
    };
    expect(tabSeparated(table)).toBe('Time, h\tA Face, °C\n0\t0.3333333\nx y\t\n1\t\n');
  });
});
