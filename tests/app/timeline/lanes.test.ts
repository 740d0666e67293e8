import { describe, expect, it } from 'vitest';
import { linearScale } from '../../../app/draw';
import { barRows } from '../../../app/timeline/bars';
import { brokenAreas, drawnCurves, limitLines, lettersOf, marksOf } from '../../../app/timeline/curvePicture';
import { setPointHandles, stageGrips } from '../../../app/timeline/handles';
import { countingWindow, differenceCurves, temperatureCurves, worstBeyond } from '../../../app/timeline/series';
import { stageInWords } from '../../../app/timeline/stageWords';
import { otherCourses, setPointActs } from '../../../app/timeline/surroundings';
import { allTimes, curveTable, cycleTable, spanTable } from '../../../app/timeline/tables';
import { layCycle, type Project } from '../../../solver/model';
import { solve } from '../../../solver/planning';
import { lining } from '../support/lining';

const HOUR = 3600;
const plan = lining();
const laid = layCycle(plan);
const result = solve(plan);
const change = (edit: (project: Project) => void): Project => {
  const copy = structuredClone(plan);
  edit(copy);
  return copy;
};

describe('temperature curves', () => {
  it('are the probes in the order of the plan, then the points that requirements speak of', () => {
    const { series } = temperatureCurves(plan, laid, result, 'SI');
    expect(series.map(({ letter, name }) => `${letter} ${name}`)).toEqual([
      'A Face',
      'B Middle',
      'C Behind',
      'D Deep',
      'E Coldest point',
    ]);
  });

  it('carry their limits over the time in which those count, in the units on screen', () => {
    const { limits } = temperatureCurves(plan, laid, result, 'US');
    expect(limits.map(({ text }) => text)).toEqual(['E ≥ 226.4 °F', 'B ≤ 752 °F']);
    const middle = limits.find(({ series }) => series === 'p2');
    expect([middle?.from, middle?.to]).toEqual([6 * HOUR, 8 * HOUR]);
    expect(middle?.side).toBe(1);
    expect(middle?.broken).toBe(false);
  });

  it('draw equal limits once', () => {
    const twice = change(({ requirements }) => requirements.push({ ...requirements[1], id: 'r9' }));
    expect(temperatureCurves(twice, laid, solve(twice), 'SI').limits).toHaveLength(2);
  });
});

describe('difference curves', () => {
  it('are the whole part, and one material where that is another curve', () => {
    expect(differenceCurves(plan, laid, result, 'SI').series.map(({ name }) => name)).toEqual(['Whole part', 'In one material']);
    const oneMaterial = change(({ part }) => part.layers.forEach((layer) => (layer.material = 'brick')));
    expect(differenceCurves(oneMaterial, laid, solve(oneMaterial), 'SI').series.map(({ name }) => name)).toEqual(['Whole part']);
  });

  it('know a broken limit and its worst point inside its window', () => {
    const { series, limits } = differenceCurves(plan, laid, result, 'SI');
    const answer = result.answers.find(({ requirement }) => requirement === 'r3');
    expect(limits[0].broken).toBe(answer?.met === false);
    const tight = { ...limits[0], value: 50, from: 0, to: 2 * HOUR };
    const worst = worstBeyond(series[1].history, tight);
    expect(worst?.time).toBeLessThanOrEqual(2 * HOUR);
    expect(worst?.value).toBeGreaterThan(50);
    expect(worstBeyond(series[1].history, { ...tight, value: 1e6 })).toBeNull();
  });
});

describe('windows in which requirements count', () => {
  const window = (counts: Project['requirements'][number]['counts']) => countingWindow({ ...plan.requirements[0], counts }, laid);
  it('are the cycle, a stage, a time from a stage, or an instant', () => {
    expect(window({ kind: 'cycle' })).toEqual([0, 9 * HOUR]);
    expect(window({ kind: 'stage', stage: 'soak' })).toEqual([6 * HOUR, 8 * HOUR]);
    expect(window({ kind: 'within', time: 5 * HOUR, from: 'soak' })).toEqual([6 * HOUR, 9 * HOUR]);
    expect(window({ kind: 'stageEnd', stage: 'soak' })).toEqual([8 * HOUR, 8 * HOUR]);
  });
});

describe('what lies over the curves', () => {
  const tight = change(({ requirements }) => {
    requirements[2].must = { kind: 'staysBelow', limit: 40 };
    requirements[1].must = { kind: 'staysBelow', limit: 60 };
  });
  const answers = solve(tight);
  const curves = differenceCurves(tight, laid, answers, 'SI');
  const plot = { time: linearScale(0, laid.end, 0, 1000), value: linearScale(0, 500, 100, 10), width: 1000, height: 110 };
  const drawn = drawnCurves(curves, plot);
  const points = curves.series.map(({ history }) => ({
    time: [...Array.from(history.time)],
    value: [...Array.from(history.value)],
  }));
  const words = { kind: 'temperatureDifference' as const, system: 'SI' as const, decimals: 0 };

  it('hatches what is beyond a broken limit, inside its window', () => {
    const areas = brokenAreas(curves, points, plot);
    expect(areas.length).toBeGreaterThan(0);
    const right = Math.max(...areas.flatMap((path) => [...path.matchAll(/[ML]([\d.]+) /g)].map((found) => Number(found[1]))));
    expect(right).toBeLessThanOrEqual(plot.time.at(2 * HOUR) + 0.01);
  });

  it('marks the worst point of a broken limit, and the largest where none is broken', () => {
    const limits = limitLines(curves, plot, drawn);
    const [worst] = marksOf(curves, plot, drawn, limits, 'part', words);
    expect(worst.bad).toBe(true);
    expect(worst.text).toMatch(/^worst \d+ K at /);
    const calm = differenceCurves(plan, laid, result, 'SI');
    const unbroken = { ...calm, limits: calm.limits.map((limit) => ({ ...limit, broken: false })) };
    const [largest] = marksOf(unbroken, plot, drawn, [], 'part', words);
    expect(largest.bad).toBe(false);
    expect(largest.text).toMatch(/^largest \d+ K at /);
  });

  it('leaves out limits and marks that are not in sight', () => {
    const late = { ...plot, time: linearScale(8.5 * HOUR, laid.end, 0, 1000) };
    expect(limitLines(curves, late, drawnCurves(curves, late))).toEqual([]);
    expect(marksOf(curves, late, drawnCurves(curves, late), [], 'none', words)).toEqual([]);
  });

  it('keeps a limit at one instant as a short line', () => {
    const instant = change(({ requirements }) => (requirements[2].counts = { kind: 'stageEnd', stage: 'soak' }));
    const [line] = limitLines(differenceCurves(instant, laid, solve(instant), 'SI'), plot, drawn);
    expect(line.to - line.from).toBeGreaterThan(6);
    expect((line.to + line.from) / 2).toBeCloseTo(plot.time.at(8 * HOUR), 6);
  });

  it('gives letters to lettered series only', () => {
    expect(lettersOf(curves, drawn, [], [])).toEqual([]);
    const temperature = temperatureCurves(plan, laid, result, 'SI');
    const value = linearScale(0, 600, 200, 10);
    const tall = { ...plot, value, height: 210 };
    const letters = lettersOf(temperature, drawnCurves(temperature, tall), [], []);
    expect(letters.map(({ item }) => item.letter)).toEqual(['A', 'B', 'C', 'D', 'E']);
  });
});

describe('bars of requirements', () => {
  it('come in the order of the plan with the spans of their answers', () => {
    const rows = barRows(plan, laid, result, 'SI');
    expect(rows.map(({ requirement }) => requirement)).toEqual(['r1', 'r2', 'r3']);
    rows.forEach((row, index) => expect(row.verdict).toBe(result.answers[index].verdict));
  });

  it('show a kept limit as a quiet tint, never as solid', () => {
    const [, kept] = barRows(plan, laid, result, 'SI');
    expect(kept.spans.map(({ kind }) => kind)).not.toContain('fulfilled');
    expect(kept.spans.map(({ kind }) => kind)).toContain('holding');
  });

  it('say for how long a limit was broken', () => {
    const tight = change(({ requirements }) => (requirements[2].must = { kind: 'staysBelow', limit: 40 }));
    const row = barRows(tight, laid, solve(tight), 'SI')[2];
    expect(row.note?.tone).toBe('not');
    expect(row.note?.text).toMatch(/^over for /);
    expect(row.sentence).toContain('not met');
  });

  it('wait, with the window in which they will count, while there is no answer', () => {
    const [, row] = barRows(plan, laid, null, 'SI');
    expect(row.verdict).toBe('waiting');
    expect(row.spans).toEqual([{ from_s: 6 * HOUR, to_s: 8 * HOUR, kind: 'counting' }]);
  });
});

describe('handles of the cycle', () => {
  it('are the corners of the set-point that an edit can move', () => {
    const handles = setPointHandles(plan, laid);
    expect(handles.map(({ at, time, value }) => [at, time / HOUR, value])).toEqual([
      ['cycle', 0, 25],
      [0, 5, 525],
      [1, 6, 525],
    ]);
    expect(handles.map(({ moves }) => moves)).toEqual([
      { value: true, time: false },
      { value: true, time: true },
      { value: false, time: true },
    ]);
  });

  it('leave out what the end of a stage cuts off, and know a start value of a stage', () => {
    const cut = change(({ cycle }) => {
      cycle.stages[0].end = { after: 2 * HOUR };
      cycle.stages[1].setPoint = { start: 400, segments: [] };
    });
    const handles = setPointHandles(cut, layCycle(cut));
    expect(handles.map(({ at, time, value }) => [at, time / HOUR, value])).toEqual([
      ['cycle', 0, 25],
      ['start', 2, 400],
    ]);
  });

  it('have a grip at an end that is a time, and none at one that the cycle computes', () => {
    expect(stageGrips(plan, laid).map(({ grip }) => grip)).toEqual([false, true, true]);
  });
});

describe('courses outside the faces', () => {
  it('are those that are not the set-point and not always the same', () => {
    const courses = otherCourses(plan, laid);
    expect(courses.map(({ name }) => name)).toEqual(['Hot face']);
    const { time, value } = courses[0].line;
    expect(value[time.indexOf(6 * HOUR)]).toBe(500);
    expect(value.filter(Number.isNaN)).toHaveLength(2);
  });

  it('say in which stages the set-point acts on a face', () => {
    expect(setPointActs(laid)).toEqual([true, false, false]);
  });

  it('are one where both faces meet the same', () => {
    const both = change(({ cycle }) => cycle.stages.forEach((stage) => (stage.exposures.end = stage.exposures.start)));
    expect(otherCourses(both, layCycle(both)).map(({ name }) => name)).toEqual(['Both faces']);
  });
});

describe('words and tables', () => {
  it('tell what a stage does', () => {
    expect(plan.cycle.stages.map((stage, index) => stageInWords(stage, laid.stages[index], 'SI'))).toEqual([
      '100 K/h to 525 °C, then 1 h 00 min',
      '2 h 00 min',
      '1 h 00 min',
    ]);
  });

  it('hold every point of every curve once, in the units on screen', () => {
    const { series } = temperatureCurves(plan, laid, result, 'US');
    const times = allTimes(series);
    const table = curveTable('Temperature', series, times, 'temperature', 'US');
    expect(table.columns.slice(0, 2)).toEqual(['Time, h', 'A Face, °F']);
    expect(table.rows[0].slice(0, 2)).toEqual([0, 77]);
    expect(new Set(times).size).toBe(times.length);
    expect(table.rows).toHaveLength(times.length);
  });

  it('leave a gap where nothing acts, and list all spans', () => {
    const courses = otherCourses(plan, laid);
    const rows = cycleTable(plan, laid, courses, 'SI').rows.filter(([name]) => name === 'Hot face');
    expect(rows[0]).toEqual(['Hot face', 0, null]);
    const spans = barRows(plan, laid, result, 'SI').reduce((sum, row) => sum + row.spans.length, 0);
    expect(spanTable(barRows(plan, laid, result, 'SI'), laid.end).rows).toHaveLength(spans);
  });
});
