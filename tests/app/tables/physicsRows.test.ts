import { describe, expect, it } from 'vitest';
import {
  applyCommand,
  setContactKind,
  setExposureKind,
  setMaterialCurve,
  setPartKind,
  setInnerRadius,
  type Command,
} from '../../../app/commands';
import { exposureRows, ownRamps } from '../../../app/cycle/exposureRows';
import { besideKind, besideOfKind, correlationNamed, FILM_KINDS, filmKind, filmOfKind } from '../../../app/cycle/films';
import { SOURCE_KINDS, sourceKind, sourceOfKind } from '../../../app/cycle/sourceKinds';
import { courseLine } from '../../../app/draw';
import { CURVE_KINDS, curveOfKind, kindOfCurve } from '../../../app/part/curves';
import { layerRows } from '../../../app/part/layerRows';
import { materialRows } from '../../../app/part/materialRows';
import { readPlain } from '../../../app/part/plainNumber';
import { outsideRange, sidesAt } from '../../../app/section/sides';
import { problemsIn } from '../../../app/stores';
import type { Cell, Row } from '../../../app/ui';
import { cellText } from '../../../app/ui/grid/cells';
import { layCycle, type Project } from '../../../solver/model';
import { lining } from '../support/lining';

const plan = lining();
const [heat] = plan.cycle.stages;
const [brick] = plan.materials;
const texts = (row: Row): string[] => row.cells.map((cell) => cellText(cell, 'SI'));
const rowsOf = (project: Project) => exposureRows(project, 0, layCycle(project).stages[0], 'SI');
const choose = (cell: Cell, value: string): Command => {
  const command = cell.kind === 'choice' ? cell.edit(value) : null;
  if (command === null) throw new Error('no such choice');
  return command;
};

describe('materials over temperature', () => {
  const table = {
    table: [
      [20, 45],
      [400, 38],
      [900, 27],
    ] as [number, number][],
  };

  it('say how many points a table has and where it lies', () => {
    const over = applyCommand(plan, setMaterialCurve(brick, 'conductivity', table, 'table'));
    expect(texts(materialRows(over, 'SI')[0])[1]).toBe('table, 3 points, 20 to 900 °C');
  });

  it('refuse an expression in the words of its reader, where it is typed', () => {
    const over = applyCommand(plan, setMaterialCurve(brick, 'conductivity', { expression: '45 - 0.02*T' }, 'e'));
    const cell = materialRows(over, 'SI')[0].cells[1];
    if (cell.kind !== 'text') throw new Error('not a text');
    expect(cell.refuse?.('45 - q')).toMatch(/does not know "q"/);
    expect(cell.refuse?.('45 - T/100')).toBeNull();
    expect(applyCommand(over, cell.edit('45 - T/100')).materials[0].conductivity).toEqual({ expression: '45 - T/100' });
  });

  it('become every other kind near the same value', () => {
    for (const curve of [45, table, { expression: '45' }]) {
      for (const { value: kind } of CURVE_KINDS) {
        const next = curveOfKind(kind, curve);
        expect(kindOfCurve(next)).toBe(kind);
        expect(curveOfKind('number', next)).toBe(45);
      }
    }
  });
});

describe('layers', () => {
  it('show an air gap by its width', () => {
    const act = layerRows(plan, () => {})[0].more?.find(({ label }) => label.startsWith('Air gap'));
    const gap = applyCommand(plan, act?.command?.() as Command);
    expect(texts(layerRows(gap, () => {})[0])[3]).toBe('air gap 1 mm');
    expect(applyCommand(gap, setContactKind(plan.part.layers[0], 0)).part.layers[0].contact).toBe(0);
  });

  it('show in words a start that is no number of theirs', () => {
    const steady: Project = { ...plan, initial: { steady: heat.exposures } };
    expect(texts(layerRows(steady, () => {})[0])[4]).toBe('steady');
    const profile: Project = {
      ...plan,
      initial: {
        profile: [
          [0, 20],
          [0.1, 30],
        ],
      },
    };
    expect(layerRows(profile, () => {})[0].cells[4]).toMatchObject({ kind: 'shown', text: 'profile' });
  });
});

describe('exposures of format 2', () => {
  it('say emissivity and enclosure of a face that radiates', () => {
    const radiating = applyCommand(plan, setExposureKind(heat, 'end', 'Cold face', 'radiation'));
    expect(texts(rowsOf(radiating)[1])).toEqual(['Cold face', 'radiation', 'ε 0.8', 'constant', '25 °C']);
    const own = applyCommand(radiating, choose(rowsOf(radiating)[1].cells[3], 'ramps'));
    expect(ownRamps(own.cycle.stages[0])).toEqual([{ face: 'end', key: 'enclosure' }]);
    expect(sidesAt(radiating, layCycle(radiating), 0)[1]).toMatchObject({ name: 'Enclosure', temperature: 25 });
  });

  it('take an expression of time that starts where the face was, and draw it', () => {
    const over = applyCommand(plan, choose(rowsOf(plan)[1].cells[3], 'expression'));
    const cell = rowsOf(over)[1].cells[4];
    if (cell.kind !== 'text') throw new Error('not a text');
    expect(cell.text).toBe('25');
    expect(cell.refuse?.('20 + T')).toMatch(/does not know "T"/);
    const daily = applyCommand(over, cell.edit('20 + t/3600'));
    expect(problemsIn(daily)).toEqual([]);
    const { surroundings } = layCycle(daily).stages[0].exposures.end as { surroundings: Parameters<typeof courseLine>[0] };
    const line = courseLine(surroundings, 0, 7200);
    expect([line.value[0], line.value.at(-1)]).toEqual([20, 22]);
    expect(outsideRange(layCycle(daily))?.[0]).toBe(20);
  });

  it('leave out the start face of a solid part', () => {
    const ball = [setPartKind('sphere'), setInnerRadius({ value: 0, text: 'solid' })].reduce(applyCommand, plan);
    expect(rowsOf(ball).map(({ id }) => id)).toEqual(['end']);
    expect(sidesAt(ball, layCycle(ball), 0)[0].name).toBe('Centre');
  });

  it('can give a film coefficient in every way and still run', () => {
    for (const { value: kind } of FILM_KINDS) {
      const coefficient = filmOfKind(kind, 12);
      expect(filmKind(coefficient)).toBe(kind);
      const film = { kind: 'film' as const, coefficient, surroundings: 20 };
      const next: Project = {
        ...plan,
        cycle: {
          ...plan.cycle,
          stages: [{ ...heat, exposures: { ...heat.exposures, end: film } }, ...plan.cycle.stages.slice(1)],
        },
      };
      expect(problemsIn(next)).toEqual([]);
      expect(texts(rowsOf(next)[1])[2]).not.toBe('');
    }
    expect(correlationNamed('forcedPlate', { fluid: 'air', length: 2 })).toMatchObject({ velocity: 1 });
    expect(correlationNamed('naturalPlateUp', { fluid: 'air', length: 2, velocity: 3 })).not.toHaveProperty('velocity');
  });

  it('have radiation beside a film of every kind', () => {
    const film = { kind: 'film' as const, coefficient: 10, surroundings: 20 };
    for (const kind of ['none', 'surroundings', 'enclosure'] as const) {
      const radiation = besideOfKind(kind, film, 20) ?? undefined;
      expect(besideKind({ ...film, radiation })).toBe(kind);
    }
  });
});

it('sources become what was chosen', () => {
  for (const { value: kind } of SOURCE_KINDS) expect(sourceKind(sourceOfKind(kind))).toBe(kind);
});

it('plain numbers are read as they are typed, or refused', () => {
  expect(readPlain(' 1.5e5 ')).toEqual({ value: 150000, refusal: null });
  expect(readPlain('much').refusal).toBe('“much” is not a number.');
});
