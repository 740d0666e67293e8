import { describe, expect, it } from 'vitest';
import { csvText, valueAtTime } from '../../../main/cli/csv';
import { readProject, writeProject, type Project } from '../../../solver/model';
import { solve } from '../../../solver/planning';
import { command, sampleText, systemError } from './fakeIo';

/** A plain reader of RFC 4180, for reading back what was written. */
function readCsv(text: string): string[][] {
  const rows: string[][] = [[]];
  const cell = /(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n)/gy;
  for (let match = cell.exec(text); match !== null; match = cell.exec(text)) {
    rows[rows.length - 1].push(match[1]?.replaceAll('""', '"') ?? match[2]);
    if (match[3] === '\r\n') rows.push([]);
  }
  expect(rows.pop()).toEqual([]);
  return rows;
}

describe('cells', () => {
  it.each([
    ['plain text', 'Hot face', 'Hot face'],
    ['a comma', 'Wall, outside', '"Wall, outside"'],
    ['quotes', 'the "slow" one', '"the ""slow"" one"'],
    ['a line break', 'one\ntwo', '"one\ntwo"'],
    ['a formula', '=1+1', "'=1+1"],
    ['a formula with a comma', '=SUM(A1,A2)', '"\'=SUM(A1,A2)"'],
    ['a plus', '+49 K', "'+49 K"],
    ['a minus in text', '-5 degrees', "'-5 degrees"],
    ['an at sign', '@home', "'@home"],
    ['a negative number', -5.25, '-5.25'],
    ['a tiny number', 1.5e-9, '1.5e-9'],
    ['nothing', null, ''],
  ])('%s', (_, cell, text) => expect(csvText([[cell, 1]])).toBe(`${text},1\r\n`));

  it('are read back as they were', () => {
    const rows = [
      ['a "b", c', 'd\r\ne', ''],
      ['1', '2', '3'],
    ];
    expect(readCsv(csvText(rows))).toEqual(rows);
  });
});

describe('a history at a time', () => {
  const times = Float64Array.of(0, 10, 10, 20);
  const values = Float64Array.of(0, 100, 50, 70);
  it.each([
    [0, 0],
    [5, 50],
    [10, 50],
    [15, 60],
    [20, 70],
    [25, 70],
    [-1, 0],
  ])('at %d s is %d; at a jump it is the value after it', (time, value) => expect(valueAtTime(times, values, time)).toBe(value));
});

describe('run --csv', () => {
  const text = sampleText('panel-cure');
  const project = JSON.parse(text) as Project satisfies Project;

  it('writes three files instead of tables, and says so', async () => {
    const { code, out, err, written } = await command(['run', 'a', '--csv', 'dir'], { files: { a: text } });
    expect([code, out]).toEqual([0, '']);
    expect(Object.keys(written)).toEqual(['dir/answers.csv', 'dir/probes.csv', 'dir/field.csv']);
    expect(err).toBe('Wrote dir/answers.csv\nWrote dir/probes.csv\nWrote dir/field.csv\n');
    const quiet = await command(['run', 'a', '--csv', 'dir', '--quiet'], { files: { a: text } });
    expect(quiet.err).toBe('');
  });

  it('goes together with --json', async () => {
    const { out, written } = await command(['run', 'a', '--json', '--csv', 'dir'], { files: { a: text } });
    expect(JSON.parse(out)).toHaveProperty('answers');
    expect(Object.keys(written)).toHaveLength(3);
  });

  it('has a row of answers for every requirement, with its figures in full', async () => {
    const { written } = await command(['run', 'a', '--csv', 'd'], { files: { a: text } });
    const [head, ...rows] = readCsv(written['d/answers.csv']);
    const { answers } = solve(project);
    expect(rows).toHaveLength(project.requirements.length);
    rows.forEach((row, index) => {
      const cells = Object.fromEntries(row.map((cell, column) => [head[column], cell]));
      expect(cells).toMatchObject({ requirement: answers[index].requirement, verdict: answers[index].verdict });
      expect(Number(cells['value'])).toBe(answers[index].value);
      expect(Number(cells['margin'])).toBe(answers[index].margin);
    });
  });

  it('has rows of probes every output.interval and at every stage edge, with headings that carry the unit', async () => {
    const { written } = await command(['run', 'a', '--csv', 'd'], { files: { a: text } });
    const [head, ...rows] = readCsv(written['d/probes.csv']);
    expect(head).toEqual(['time_s', ...project.probes.map(({ name }) => `${name} (°C)`)]);
    const times = rows.map(([time]) => Number(time));
    const { stages, probes } = solve(project);
    const end = stages.at(-1)?.end_s as number;
    for (let time = 0; time <= end; time += project.output.interval as number) {
      expect(times.some((row) => Math.abs(row - time) < 1e-6)).toBe(true);
    }
    for (const { end_s } of stages) expect(times).toContain(end_s);
    expect(times).toEqual([...times].sort((a, b) => a - b));
    expect(rows.every((row) => row.every((cell) => Number.isFinite(Number(cell))))).toBe(true);
    expect(Number(rows.at(-1)?.[1])).toBe(probes[0].temperature_C.at(-1));
  });

  it('has two hundred equal rows and the edges without an interval', async () => {
    const { output: _, ...rest } = project;
    const read = readProject(JSON.stringify({ ...rest, output: {} }));
    if (read.kind !== 'project') throw new Error('the plan is bad');
    const { written } = await command(['run', 'a', '--csv', 'd'], { files: { a: writeProject(read.project) } });
    const rows = readCsv(written['d/field.csv']).slice(1);
    expect(rows.length).toBeGreaterThanOrEqual(201);
    expect(rows.length).toBeLessThanOrEqual(201 + project.cycle.stages.length);
    for (const [, coldest, hottest, difference] of rows.map((row) => row.map(Number))) {
      expect(hottest).toBeGreaterThanOrEqual(coldest);
      expect(difference).toBe(hottest - coldest);
    }
  });

  it('that cannot be written: 5, in plain words', async () => {
    const ended = await command(['run', 'a', '--csv', 'd'], { files: { a: text }, writing: systemError('ENOSPC') });
    expect(ended.code).toBe(5);
    expect(ended.err).toMatch(/answers\.csv could not be saved: the disk is full/);
  });
});
