/** Rows of the exposure table: what each face meets in one stage. */
import {
  EXPOSURE_NAMES,
  renameFace,
  setExposureKind,
  setSchedule,
  setScheduleNumber,
  typedAt,
  type ScheduleKey,
} from '../commands';
import { countOf, orKind, type Cell, type Column, type Row } from '../ui';
import {
  FACES,
  type ExposureKind,
  type FaceId,
  type LaidStage,
  type PlainSchedule,
  type Project,
  type Stage,
  type TemperatureSchedule,
} from '../../solver/model';
import type { QuantityKind } from '../../solver/model/quantities';

export const EXPOSURE_COLUMNS: readonly Column[] = [
  { head: '' },
  { head: 'Meets', width: '20%' },
  { head: 'Film coefficient', width: '19%', align: 'right' },
  { head: 'Outside', width: '19%' },
  { head: 'Value', width: '15%', align: 'right' },
];

const KINDS: readonly ExposureKind[] = ['film', 'temperature', 'flux', 'insulated'];
const NOTHING: Cell = { kind: 'shown', text: '' };

export const faceName = (project: Project, face: FaceId): string =>
  orKind(project.part.faces[face].name, face === 'start' ? 'start face' : 'end face');

interface At {
  project: Project;
  stage: Stage;
  stageIndex: number;
  laid: LaidStage | undefined;
  face: FaceId;
}

export const exposureRows = (project: Project, stageIndex: number, laid: LaidStage | undefined): Row[] =>
  FACES.map((face) => {
    const at: At = { project, stage: project.cycle.stages[stageIndex], stageIndex, laid, face };
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
    exposure.kind === 'film' ? coefficientCell(at, exposure.coefficient) : NOTHING,
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

const coefficientCell = (at: At, schedule: PlainSchedule): Cell =>
  typeof schedule === 'number'
    ? numberCell(at, 'coefficient', schedule, 'filmCoefficient', 'Film coefficient', 0)
    : rampCell(at, 'coefficient', schedule.segments.length);

type Source = 'constant' | 'setPoint' | 'ramps';

/** Where a schedule comes from, and its value. */
function outsideCells(at: At, key: ScheduleKey, schedule: TemperatureSchedule): [Cell, Cell] {
  const { project, stage, face } = at;
  const path = [...pathOf(at), key];
  const source: Source = typeof schedule === 'number' ? 'constant' : 'follow' in schedule ? 'setPoint' : 'ramps';
  const options: { value: Source; label: string }[] = [
    { value: 'constant', label: 'constant' },
    ...(key === 'flux' ? [] : [{ value: 'setPoint' as const, label: orKind(project.cycle.setPoint.name, 'set-point') }]),
    { value: 'ramps', label: 'own ramps' },
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

const labelOf = (source: Source): string => ({ constant: 'constant', setPoint: 'the set-point', ramps: 'own ramps' })[source];

/** A schedule of another source that starts from what the face meets at the start of the stage. */
function scheduleFrom(source: Source, at: At, key: ScheduleKey): TemperatureSchedule | PlainSchedule {
  const now = entryValue(at, key);
  if (source === 'setPoint') return { follow: 'setPoint', offset: 0 };
  return source === 'constant' ? now : { start: now, segments: [] };
}

function entryValue({ laid, face, stage }: At, key: ScheduleKey): number {
  const line = (laid?.exposures[face] as Record<string, { value: number[] } | string> | undefined)?.[key];
  if (typeof line === 'object') return Number(line.value[0].toPrecision(6));
  const schedule = (stage.exposures[face] as Record<string, unknown>)[key];
  return typeof schedule === 'number' ? schedule : key === 'flux' ? 0 : 20;
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
    (['coefficient', 'surroundings', 'temperature', 'flux'] as const)
      .filter((key) => {
        const schedule = (stage.exposures[face] as Record<string, unknown>)[key];
        return typeof schedule === 'object' && schedule !== null && 'segments' in schedule;
      })
      .map((key) => ({ face, key })),
  );
}
