import { describe, expect, it } from 'vitest';
import { applyCommand, setExposureKind, setSegment, setSetPointStart, type Command } from '../../../app/commands';
import { courseInWords, courseOf, segmentOfKind, valueAtStart } from '../../../app/cycle/course';
import { exposureRows, ownRamps } from '../../../app/cycle/exposureRows';
import { nextSegment, segmentRows, type Schedule } from '../../../app/cycle/segmentRows';
import { stageRows } from '../../../app/cycle/stageRows';
import { placeKind, placeOfKind, probeRows } from '../../../app/part/probeRows';
import {
  countsOfKind,
  ruleChoice,
  ruleOfChoice,
  subjectChoice,
  subjectChoices,
  subjectOfChoice,
} from '../../../app/requirements/rules';
import { gridCounts, readCounts } from '../../../app/solving/grids';
import { problemsIn } from '../../../app/stores';
import type { Cell, Row } from '../../../app/ui';
import { cellText } from '../../../app/ui/grid/cells';
import { layCycle, type Project } from '../../../solver/model';
import { lining } from '../support/lining';

const plan = lining();
const laid = layCycle(plan);
const texts = (row: Row): string[] => row.cells.map((cell) => cellText(cell, 'SI'));
const choose = (cell: Cell, value: string): Command => {
  const command = cell.kind === 'choice' ? cell.edit(value) : null;
  if (command === null) throw new Error('no such choice');
  return command;
};

describe('stages', () => {
  it('say their course, their end and when that is', () => {
    const rows = stageRows(plan, laid, 'SI');
    expect(texts(rows[0])).toEqual(['Heat', '2 segments to 525 °C, 6 h 00 min', 'at target', '6 h 00 min', '6 h 00 min']);
    expect(texts(rows[1])).toEqual(['Soak', 'holds', 'after a time', '2 h 00 min', '8 h 00 min']);
  });

  it('that end at a target keep their length when they are ended by a time', () => {
    const after = applyCommand(plan, choose(stageRows(plan, laid, 'SI')[0].cells[2], 'after'));
    expect(after.cycle.stages[0].end).toEqual({ after: 21600 });
  });

  it('without a cycle that can be laid out show no times', () => {
    expect(texts(stageRows(plan, null, 'SI')[0])).toEqual(['Heat', '2 segments to 525 °C', 'at target', '–', '–']);
  });
});

describe('segments', () => {
  const schedule: Schedule = {
    stage: plan.cycle.stages[0],
    of: 'setPoint',
    ramp: plan.cycle.stages[0].setPoint ?? { segments: [] },
    entry: 25,
    stageStart: 0,
  };

  it('say target, rate, time and when they are done', () => {
    expect(segmentRows(plan, schedule).map(texts)).toEqual([
      ['ramp at a rate', '525 °C', '100 K/h', '5 h 00 min', '5 h 00 min'],
      ['hold', 'holds', '', '1 h 00 min', '6 h 00 min'],
    ]);
  });

  it('become another kind that takes as long', () => {
    const [ramp, hold] = courseOf(schedule.ramp, 25);
    expect(segmentOfKind('duration', ramp, 'temperature')).toEqual({ to: 525, duration: 18000 });
    expect(segmentOfKind('rate', { ...ramp, segment: { to: 525, duration: 18000 } }, 'temperature')).toEqual({
      to: 525,
      rate: 0.0277778,
    });
    expect(segmentOfKind('duration', hold, 'temperature')).toEqual({ to: 525, duration: 3600 });
    expect(segmentOfKind('jump', ramp, 'temperature')).toEqual({ to: 525, duration: 0 });
    expect(segmentOfKind('hold', ramp, 'temperature')).toEqual({ hold: 18000 });
  });

  it('after a ramp begin as a hold, after a hold as a ramp', () => {
    expect(nextSegment(schedule)).toEqual({ to: 625, rate: 50 / 3600 });
    expect(nextSegment({ ...schedule, ramp: { segments: [{ to: 100, duration: 60 }] } })).toEqual({ hold: 3600 });
  });

  it('are said in words', () => {
    expect(courseInWords({ segments: [{ to: 180, rate: 20 / 3600 }] }, 20, 'SI')).toBe('to 180 °C at 20 K/h');
    expect(courseInWords({ segments: [{ to: 180, duration: 10800 }] }, 20, 'SI')).toBe('to 180 °C in 3 h 00 min');
    expect(courseInWords({ segments: [{ to: 180, duration: 0 }] }, 20, 'US')).toBe('jumps to 356 °F');
    expect(courseInWords({ segments: [{ hold: 60 }] }, 20, 'SI')).toBe('holds for 1 min 00 s');
    expect(courseInWords({ segments: [] }, 20, 'SI')).toBe('holds');
  });

  it('a schedule enters a stage with what was reached before it', () => {
    expect(valueAtStart(laid, 1, 'setPoint')).toBe(525);
    expect(valueAtStart(laid, 1, { face: 'start', key: 'temperature' })).toBe(500);
    expect(valueAtStart(null, 0, 'setPoint')).toBeNaN();
  });
});

describe('exposures', () => {
  it('say what each face meets', () => {
    expect(exposureRows(plan, 0, laid.stages[0], 'SI').map(texts)).toEqual([
      ['Hot face', 'film', '45 W/m²·K', 'Gas', 'no offset'],
      ['Cold face', 'film', '10 W/m²·K', 'constant', '25 °C'],
    ]);
    expect(texts(exposureRows(plan, 1, laid.stages[1], 'SI')[0])).toEqual([
      'Hot face',
      'fixed temperature',
      '',
      'own ramps',
      '1 segment',
    ]);
    expect(texts(exposureRows(plan, 2, laid.stages[2], 'SI')[0])).toEqual(['Hot face', 'insulated', '', '', '']);
  });

  it('become ramps of their own that start where they are', () => {
    const after = applyCommand(plan, choose(exposureRows(plan, 0, laid.stages[0], 'SI')[0].cells[3], 'ramps'));
    expect(after.cycle.stages[0].exposures.start).toMatchObject({ surroundings: { start: 25, segments: [] } });
    expect(ownRamps(after.cycle.stages[0])).toEqual([{ face: 'start', key: 'surroundings' }]);
    expect(problemsIn(after)).toEqual([]);
  });

  it('every kind can become every other and still run', () => {
    for (const from of ['insulated', 'temperature', 'flux', 'film'] as const) {
      const first = applyCommand(plan, setExposureKind(plan.cycle.stages[0], 'start', 'Hot face', from));
      for (const to of ['insulated', 'temperature', 'flux', 'film'] as const) {
        const next = applyCommand(first, setExposureKind(first.cycle.stages[0], 'start', 'Hot face', to));
        expect(problemsIn(next)).toEqual([]);
        expect(next.cycle.stages[0].exposures.start.kind).toBe(to);
      }
    }
  });

  it('a film coefficient can go over time, and back', () => {
    const act = (project: Project) =>
      exposureRows(project, 0, layCycle(project).stages[0], 'SI')[0].more?.[0].command?.() as Command;
    const over = applyCommand(plan, act(plan));
    expect(ownRamps(over.cycle.stages[0])).toEqual([{ face: 'start', key: 'coefficient' }]);
    expect(applyCommand(over, act(over)).cycle.stages[0].exposures.start).toMatchObject({ coefficient: 45 });
  });
});

describe('probes', () => {
  it('say how and where they are placed', () => {
    expect(probeRows(plan, 'SI').map(texts)).toEqual([
      ['Face', 'at a face', 'Hot face', '0 mm'],
      ['Middle', 'in a layer', 'Backing', '0.5'],
      ['Behind', 'at an interface', 'in Shell, at Backing', '225 mm'],
      ['Deep', 'at a depth', 'from Hot face', '200 mm'],
    ]);
  });

  it('placed in another way stay where they are, or near', () => {
    const [face, middle, behind, deep] = plan.probes.map(({ at }) => at);
    expect(placeOfKind('depth', middle, plan)).toEqual({ depth: 0.1875 });
    expect(placeOfKind('layer', deep, plan)).toEqual({ layer: 'l2', fraction: 0.666667 });
    expect(placeOfKind('part', face, plan)).toEqual({ fraction: 0 });
    expect(placeOfKind('face', deep, plan)).toEqual({ face: 'end' });
    expect(placeOfKind('interface', deep, plan)).toEqual({ interface: 'l2', side: 'before' });
    expect(placeOfKind('interface', face, plan)).toEqual({ interface: 'l1', side: 'before' });
    expect(placeKind(behind)).toBe('interface');
    expect(placeOfKind('interface', face, { ...plan, part: { ...plan.part, layers: [plan.part.layers[0]] } })).toBeNull();
  });
});

describe('rules', () => {
  it('as choices come back as they were', () => {
    for (const requirement of plan.requirements) {
      expect(subjectOfChoice(subjectChoice(requirement.of))).toEqual(requirement.of);
      expect(ruleOfChoice(ruleChoice(requirement)).kind).toBe(requirement.must.kind);
    }
    expect(ruleOfChoice('heldFor atMost')).toEqual({ kind: 'heldFor', sense: 'atMost' });
  });

  it('speak of points, probes and differences', () => {
    expect(subjectChoices(plan).map(({ label }) => label)).toEqual([
      'Coldest point',
      'Hottest point',
      'Face',
      'Middle',
      'Behind',
      'Deep',
      'Difference in the part',
      'Difference in one material',
    ]);
  });

  it('keep the stage that they count in from one kind to the next', () => {
    const inSoak = { kind: 'stage', stage: 'soak' } as const;
    expect(countsOfKind('stageEnd', inSoak, 'heat')).toEqual({ kind: 'stageEnd', stage: 'soak' });
    expect(countsOfKind('within', inSoak, 'heat')).toEqual({ kind: 'within', time: 3600, from: 'soak' });
    expect(countsOfKind('stage', { kind: 'cycle' }, 'heat')).toEqual({ kind: 'stage', stage: 'heat' });
    expect(countsOfKind('cycle', inSoak, 'heat')).toEqual({ kind: 'cycle' });
  });
});

describe('counts of a grid', () => {
  it('are one for all layers, or one a layer', () => {
    expect(readCounts('21', 3)).toBe(21);
    expect(readCounts('21, 11 5', 3)).toEqual([21, 11, 5]);
    expect(gridCounts({ cells: [21, 11, 5] })).toBe('21, 11, 5');
  });

  it('are refused in words', () => {
    expect(readCounts('', 3)).toMatch(/Say how many/);
    expect(readCounts('many', 3)).toBe('“many” is not a whole number.');
    expect(readCounts('1', 3)).toBe('1 is outside 2 to 100000.');
    expect(readCounts('2, 3', 3)).toBe('One number, or one a layer: 3, got 2.');
  });
});

it('a set-point that starts elsewhere moves with all that follows it', () => {
  const after = applyCommand(plan, setSetPointStart({ value: 100, text: '100 °C' }));
  const jump = applyCommand(after, setSegment(after.cycle.stages[0], 'setPoint', 0, { to: 300, duration: 0 }));
  expect(layCycle(jump).stages[0].exposures.start).toMatchObject({ surroundings: { value: [100, 300, 300] } });
});
