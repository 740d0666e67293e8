/** Rows of the exposure table: what each face meets in one stage. */
import {
  EXPOSURE_NAMES,
  renameFace,
  faceKind,
  setEmissivity,
  setExposureKind,
  setSchedule,
  setScheduleNumber,
  typedAt,
  type ScheduleKey,
} from '../commands';
import { countOf, curveInWords, expressionRefusal, orKind, type Cell, type Column, type Row } from '../ui';
import {
  courseAt,
  facesOf,
  FACES,
  FILM_VARIABLES,
  TIME_VARIABLES,
  type Coefficient,
  type ExposureKind,
  type FaceId,
  type LaidStage,
  type PlainSchedule,
  type Project,
  type Stage,
  type TemperatureSchedule,
} from '../../solver/model';
import type { QuantityKind, UnitSystem } from '../../solver/model/quantities';
import { laidCourse } from './course';

export const exposureColumns = (system: UnitSystem): readonly Column[] => [
  { head: '' },
  { head: 'Meets', width: '22%' },
  { head: 'Film coefficient', width: system === 'SI' ? '104px' : '138px', align: 'right' },
  { head: 'Outside', width: '18%' },
  { head: 'Value', width: system === 'SI' ? '92px' : '116px', align: 'right' },
];

const KINDS: readonly ExposureKind[] = ['film', 'radiation', 'temperature', 'flux', 'insulated'];
const NOTHING: Cell = { kind: 'shown', text: '' };

export const faceName = (project: Project, face: FaceId): string =>
  orKind(project.part.faces[face].name, faceKind(project.part, face));

interface At {
  system: UnitSystem;
  project: Project;
  stage: Stage;
  stageIndex: number;
  laid: LaidStage | undefined;
  face: FaceId;
}

export const exposureRows = (project: Project, stageIndex: number, laid: LaidStage | undefined, system: UnitSystem): Row[] =>
  facesOf(project.part).map((face) => {
    const at: At = { system, project, stage: project.cycle.stages[stageIndex], stageIndex, laid, face };
    return { id: face, label: faceName(project, face), cells: exposureCells(at), more: coefficientActions(at) };
  });

function exposureCells(at: At): Cell[] {
  const { project, stage, face } = at;
  const exposure = stage.exposures[face];
  const { name } = project.part.faces[face];
  const outside: [Cell, Cell] =
    exposure.kind === 'film'
      ? outsideCells(at, 'surroundings', exposure.surroundings)
      : exposure.kind === 'temperature'
        ? outsideCells(at, 'temperature', exposure.temperature)
        : exposure.kind === 'flux'
          ? outsideCells(at, 'flux', exposure.flux)
          : exposure.kind === 'radiation'
            ? outsideCells(at, 'enclosure', exposure.enclosure)
            : [NOTHING, NOTHING];
  return [
    {
      kind: 'text',
      text: name,
      placeholder: faceName(project, face),
      path: ['part', 'faces', face, 'name'],
      edit: (next) => renameFace(face, name, next),
    },
    {
      kind: 'choice',
      value: exposure.kind,
      options: KINDS.map((kind) => ({ value: kind, label: EXPOSURE_NAMES[kind] })),
      path: [...pathOf(at), 'kind'],
      edit: (kind) => setExposureKind(stage, face, faceName(project, face), kind as ExposureKind),
    },
    exposure.kind === 'film'
      ? coefficientCell(at, exposure.coefficient)
      : exposure.kind === 'radiation'
        ? emissivityCell(at, exposure.emissivity)
        : NOTHING,
    ...outside,
  ];
}

const pathOf = ({ stageIndex, face }: At): (string | number)[] => ['cycle', 'stages', stageIndex, 'exposures', face];

function numberCell(at: At, key: ScheduleKey, value: number, quantity: QuantityKind, name: string, atLeast?: number): Cell {
  const { project, stage, face } = at;
  const path = [...pathOf(at), key];
  return {
    kind: 'quantity',
    spec: { name, quantity, bounds: { atLeast } },
    value,
    typed: typedAt(project, path),
    path,
    edit: (entered) => setScheduleNumber(stage, face, faceName(project, face), key, entered),
  };
}

const rampCell = (at: At, key: ScheduleKey, segments: number): Cell => ({
  kind: 'shown',
  text: countOf(segments, 'segment'),
  muted: true,
  path: [...pathOf(at), key],
});

/** A table over the temperature of the face and a correlation are shown in words and edited below the table. */
function coefficientCell(at: At, coefficient: Coefficient): Cell {
  const { system } = at;
  if (typeof coefficient === 'number')
    return numberCell(at, 'coefficient', coefficient, 'filmCoefficient', 'Film coefficient', 0);
  if ('segments' in coefficient) return rampCell(at, 'coefficient', coefficient.segments.length);
  if ('expression' in coefficient) return expressionCell(at, 'coefficient', coefficient.expression, FILM_VARIABLES);
  return { kind: 'shown', text: curveInWords(coefficient, system), path: [...pathOf(at), 'coefficient'] };
}

function emissivityCell(at: At, emissivity: number): Cell {
  const { project, stage, face } = at;
  const path = [...pathOf(at), 'emissivity'];
  return {
    kind: 'quantity',
    spec: { name: 'Emissivity', quantity: 'fraction', bounds: { above: 0, atMost: 1 } },
    value: emissivity,
    prefix: 'ε',
    typed: typedAt(project, path),
    path,
    edit: (entered) => setEmissivity(stage, face, faceName(project, face), entered),
  };
}

/** In SI units: °C, W/m², W/(m²·K); t and clock in s. */
function expressionCell(at: At, key: ScheduleKey, text: string, variables: readonly string[]): Cell {
  const { project, stage, face } = at;
  return {
    kind: 'text',
    text,
    path: [...pathOf(at), key],
    refuse: (next) => expressionRefusal(next, variables),
    edit: (expression) => setSchedule(stage, face, faceName(project, face), key, { expression }, expression),
  };
}

type Source = 'constant' | 'setPoint' | 'ramps' | 'expression';

/** Where a schedule comes from, and its value. */
function outsideCells(at: At, key: ScheduleKey, schedule: TemperatureSchedule): [Cell, Cell] {
  const { project, stage, face } = at;
  const path = [...pathOf(at), key];
  const source = sourceOfSchedule(schedule);
  const options: { value: Source; label: string }[] = [
    { value: 'constant', label: 'constant' },
    ...(key === 'flux' ? [] : [{ value: 'setPoint' as const, label: orKind(project.cycle.setPoint.name, 'set-point') }]),
    { value: 'ramps', label: 'own ramps' },
    { value: 'expression', label: 'expression of t' },
  ];
  const choice: Cell = {
    kind: 'choice',
    value: source,
    options,
    edit: (next) =>
      setSchedule(stage, face, faceName(project, face), key, scheduleFrom(next as Source, at, key), labelOf(next as Source)),
  };
  if (typeof schedule === 'number') {
    const kind = key === 'flux' ? 'heatFlux' : 'temperature';
    return [choice, numberCell(at, key, schedule, kind, key === 'flux' ? 'Heat flux' : 'Temperature')];
  }
  if ('expression' in schedule) return [choice, expressionCell(at, key, schedule.expression, TIME_VARIABLES)];
  if (!('follow' in schedule)) return [choice, rampCell(at, key, schedule.segments.length)];
  const offsetPath = [...path, 'offset'];
  const offset: Cell = {
    kind: 'quantity',
    spec: { name: 'Offset from the set-point', quantity: 'temperatureDifference', zero: 'no offset' },
    value: schedule.offset,
    prefix: schedule.offset > 0 ? '+' : undefined,
    typed: typedAt(project, offsetPath),
    path: offsetPath,
    edit: (entered) => setScheduleNumber(stage, face, faceName(project, face), key, entered),
  };
  return [choice, offset];
}

const labelOf = (source: Source): string =>
  ({ constant: 'constant', setPoint: 'the set-point', ramps: 'own ramps', expression: 'an expression of t' })[source];

function sourceOfSchedule(schedule: TemperatureSchedule): Source {
  if (typeof schedule === 'number') return 'constant';
  if ('follow' in schedule) return 'setPoint';
  return 'expression' in schedule ? 'expression' : 'ramps';
}

/** A schedule of another source that starts from what the face meets at the start of the stage. */
function scheduleFrom(source: Source, at: At, key: ScheduleKey): TemperatureSchedule | PlainSchedule {
  const now = entryValue(at, key);
  if (source === 'setPoint') return { follow: 'setPoint', offset: 0 };
  if (source === 'expression') return { expression: String(now) };
  return source === 'constant' ? now : { start: now, segments: [] };
}

/** The value of a quantity of an exposure at the start of the stage, in the stored unit. */
export function entryValue({ laid, face, stage }: Pick<At, 'laid' | 'face' | 'stage'>, key: ScheduleKey): number {
  const course = laid === undefined ? null : laidCourse(laid.exposures[face], key);
  if (laid !== undefined && course !== null) return Number(courseAt(course, laid.start).toPrecision(6));
  const schedule = (stage.exposures[face] as Record<string, unknown>)[key];
  if (typeof schedule === 'number') return schedule;
  return key === 'flux' ? 0 : key === 'coefficient' ? 10 : 20;
}

function coefficientActions(at: At): Row['more'] {
  const { project, stage, face } = at;
  const exposure = stage.exposures[face];
  if (exposure.kind !== 'film') return undefined;
  const constant = typeof exposure.coefficient === 'number';
  return [
    {
      label: constant ? 'Film coefficient over time' : 'Constant film coefficient',
      command: () => {
        const next: Source = constant ? 'ramps' : 'constant';
        return setSchedule(
          stage,
          face,
          faceName(project, face),
          'coefficient',
          scheduleFrom(next, at, 'coefficient'),
          labelOf(next),
        );
      },
    },
  ];
}

/** The schedules of a stage's faces that have ramps of their own. */
export function ownRamps(stage: Stage): { face: FaceId; key: ScheduleKey }[] {
  return FACES.flatMap((face) =>
    (['coefficient', 'surroundings', 'temperature', 'flux', 'enclosure'] as const)
      .filter((key) => {
        const exposure = stage.exposures[face];
        const holder = key === 'enclosure' && exposure.kind === 'film' ? (exposure.radiation ?? {}) : exposure;
        const schedule = (holder as Record<string, unknown>)[key];
        return typeof schedule === 'object' && schedule !== null && 'segments' in schedule;
      })
      .map((key) => ({ face, key })),
  );
}
