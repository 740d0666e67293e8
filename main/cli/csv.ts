/** The answers of a run as tables for spreadsheets: RFC 4180, a decimal point, every heading with its unit. */
import { layCycle, rowTimes, type Project, type RunResult } from '../../solver/model';

type CsvCell = string | number | null;

/** Text that a spreadsheet would take for a formula is led by an apostrophe; numbers are numbers. */
export function csvText(rows: readonly (readonly CsvCell[])[]): string {
  return rows.map((row) => `${row.map(cellText).join(',')}\r\n`).join('');
}

function cellText(cell: CsvCell): string {
  if (cell === null) return '';
  if (typeof cell === 'number') return String(cell);
  const safe = /^[=+\-@\t\r]/.test(cell) ? `'${cell}` : cell;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** File names with their texts: answers.csv, probes.csv, field.csv. */
export function csvFiles(project: Project, result: RunResult): [name: string, text: string][] {
  return [
    ['answers.csv', answersCsv(project, result)],
    ['probes.csv', probesCsv(project, result)],
    ['field.csv', fieldCsv(project, result)],
  ];
}

function answersCsv(project: Project, { answers }: RunResult): string {
  const stageName = (id: string | null): string | null =>
    id === null ? null : (project.cycle.stages.find((stage) => stage.id === id)?.name ?? id);
  const head = [
    'requirement',
    'name',
    'verdict',
    'time_s',
    'stage',
    'stage_time_s',
    'value',
    'limit',
    'unit',
    'margin',
    'margin_unit',
    'uncertainty',
    'value_uncertainty',
    'time_uncertainty_s',
    'position_m',
  ];
  return csvText([
    head,
    ...answers.map((answer) => [
      answer.requirement,
      answer.name,
      answer.verdict,
      answer.time_s,
      stageName(answer.stage),
      answer.stage_time_s,
      answer.value,
      answer.limit,
      answer.unit,
      answer.margin,
      answer.margin_unit,
      answer.uncertainty,
      answer.value_uncertainty,
      answer.time_uncertainty_s,
      answer.position_m,
    ]),
  ]);
}

/** A row every `output.interval`, or 200 equal ones; stage edges besides. */
function probesCsv(project: Project, result: RunResult): string {
  const { probes } = result;
  const rows = timesOf(project, result).map((time) => [
    time,
    ...probes.map(({ time_s, temperature_C }) => valueAtTime(time_s, temperature_C, time)),
  ]);
  return csvText([['time_s', ...probes.map(({ name, probe }) => `${name === '' ? probe : name} (°C)`)], ...rows]);
}

function fieldCsv(project: Project, result: RunResult): string {
  const { time_s, coldest_C, hottest_C, withinMaterial_K } = result.field;
  const rows = timesOf(project, result).map((time) => {
    const [coldest, hottest, within] = [coldest_C, hottest_C, withinMaterial_K].map((values) =>
      valueAtTime(time_s, values, time),
    );
    return [time, coldest, hottest, hottest - coldest, within];
  });
  return csvText([['time_s', 'coldest_C', 'hottest_C', 'difference_K', 'within_material_K'], ...rows]);
}

/** Rows up to where the run came. */
const timesOf = (project: Project, { outcome }: RunResult): number[] =>
  [...rowTimes(project, layCycle(project))].filter((time) => time <= outcome.reached_s);

/** A history at a time, straight between its points; at a jump, the value after it. */
export function valueAtTime(time_s: Float64Array, values: Float64Array, time: number): number {
  let [low, high] = [0, time_s.length];
  // Index of the first point later than `time`.
  while (low < high) {
    const middle = (low + high) >> 1;
    if (time_s[middle] <= time) low = middle + 1;
    else high = middle;
  }
  if (low === 0) return values[0];
  if (low === time_s.length || time_s[low - 1] === time) return values[low - 1];
  const part = (time - time_s[low - 1]) / (time_s[low] - time_s[low - 1]);
  return values[low - 1] + part * (values[low] - values[low - 1]);
}
