/** The lanes' figures as tables, in the units on screen. */
import type { LaidCycle, Project } from '../../solver/model';
import { displayUnit, toDisplay, type QuantityKind, type UnitSystem } from '../../solver/model/quantities';
import { historyAt, type DataTable } from '../draw';
import type { BarRow } from './bars';
import type { Series } from './series';
import type { Course } from './surroundings';

/** A unit for times of a cycle of this length. */
export function timeUnitOf(end: number): { text: string; length: number } {
  if (end > 7200) return { text: 'h', length: 3600 };
  return end > 600 ? { text: 'min', length: 60 } : { text: 's', length: 1 };
}

/** Seven digits: more would be noise. */
const short = (value: number): number => Number(value.toPrecision(7));

/** Curves at the given times, a column each. */
export function curveTable(
  caption: string,
  series: readonly Series[],
  times: readonly number[],
  kind: QuantityKind,
  system: UnitSystem,
): DataTable {
  const unit = timeUnitOf(times.at(-1) ?? 0);
  const name = ({ letter, name: text }: Series): string => (letter === '' ? text : `${letter} ${text}`);
  return {
    caption,
    columns: [`Time, ${unit.text}`, ...series.map((item) => `${name(item)}, ${displayUnit(kind, system)}`)],
    rows: times.map((time) => [
      short(time / unit.length),
      ...series.map(({ history }) => {
        const value = historyAt(history, time);
        return value === null ? null : short(toDisplay(value, kind, system));
      }),
    ]),
  };
}

/** Every time at which any of the curves has a point, once. */
export function allTimes(series: readonly Series[]): number[] {
  const times = new Set<number>();
  for (const { history } of series) for (let i = 0; i < history.time.length; i++) times.add(history.time[i]);
  return [...times].sort((a, b) => a - b);
}

/** Corners of the set-point and of what surrounds the faces. */
export function cycleTable({ cycle }: Project, laid: LaidCycle, courses: readonly Course[], system: UnitSystem): DataTable {
  const unit = timeUnitOf(laid.end);
  const all: Course[] = [{ key: 'setPoint', name: cycle.setPoint.name, line: laid.setPoint }, ...courses];
  const rows = all.flatMap(({ name, line }) =>
    line.time.map((time, i) => [
      name,
      short(time / unit.length),
      Number.isFinite(line.value[i]) ? short(toDisplay(line.value[i], 'temperature', system)) : null,
    ]),
  );
  return {
    caption: 'Corners of the cycle',
    columns: ['Course', `Time, ${unit.text}`, `Temperature, ${displayUnit('temperature', system)}`],
    rows,
  };
}

/** Spans of every requirement. */
export function spanTable(rows: readonly BarRow[], end: number): DataTable {
  const unit = timeUnitOf(end);
  return {
    caption: 'Spans of the requirements',
    columns: ['Requirement', 'Verdict', 'Span', `From, ${unit.text}`, `To, ${unit.text}`],
    rows: rows.flatMap(({ name, verdict, spans }) =>
      spans.map(({ kind, from_s, to_s }) => [name, verdict, kind, short(from_s / unit.length), short(to_s / unit.length)]),
    ),
  };
}
