/** The answers of a run as text that people read. */
import { CAUTION, formatDuration, formatNumber, type Project, type Report, type Verdict } from '../../solver/model';
import {
  VERDICT_WORDS,
  depth,
  difference,
  heat,
  limitOf,
  marginOf,
  temperature,
  uncertaintyOf,
  valueOf,
  whenOf,
  type Answer,
} from './figures';
import { block, columns, type Cell } from './layout';

export type Paint = (text: string, colour: 'good' | 'doubt' | 'bad') => string;

export const noPaint: Paint = (text) => text;
const SGR = { good: 32, doubt: 33, bad: 31 } as const;
/** Colours of a terminal; the words say the same without them. */
export const terminalPaint: Paint = (text, colour) => `\x1b[${SGR[colour]}m${text}\x1b[0m`;

const MOODS: Readonly<Record<Verdict, 'good' | 'doubt' | 'bad'>> = {
  met: 'good',
  thin: 'doubt',
  'not-met': 'bad',
  'never-reached': 'bad',
  'cannot-be-judged': 'doubt',
};

/** Everything that `run` prints: answers first, what they rest on after. */
export function runText(project: Project, report: Report, paint: Paint): string {
  return [
    headOf(project, report),
    block('Answers', answersTable(project, report, paint)),
    block('First answers', firstTable(project, report)),
    block('Stages', stagesTable(report)),
    block('What they rest on', restTable(report)),
    block(
      'Warnings',
      report.warnings.map(({ message, place }) => `  ${place === null ? '' : `${place}: `}${message}\n`).join(''),
    ),
    `\n${CAUTION}\n`,
  ].join('');
}

function headOf({ part, cycle }: Project, { title, layers, stages, outcome }: Report): string {
  const thickness = depth(layers[layers.length - 1].to_m);
  const end = formatDuration(stages.at(-1)?.end_s ?? 0);
  const size = `${count(part.layers.length, 'layer')}, ${thickness}; ${count(cycle.stages.length, 'stage')}`;
  if (outcome.reason === 'finished') return `${title}\n${size}, ${end}\n`;
  return `${title}\n${size}\nStopped at ${formatDuration(outcome.reached_s)}: answers up to there.\n`;
}

const count = (number: number, what: string): string => `${number} ${what}${number === 1 ? '' : 's'}`;

/** One row a requirement: verdict, name, when, value, limit, margin and its numerical uncertainty. */
export function answersTable(project: Project, { answers }: Report, paint: Paint): string {
  if (answers.length === 0) return '  The plan states no requirements.\n';
  const stageName = nameIn(project.cycle.stages);
  const row = (answer: Answer): (string | Cell)[] => {
    const must = project.requirements.find(({ id }) => id === answer.requirement)?.must;
    return [
      { text: VERDICT_WORDS[answer.verdict], paint: (text) => paint(text, MOODS[answer.verdict]) },
      answer.name,
      whenOf(answer, stageName),
      valueOf(answer),
      limitOf(answer, must),
      marginOf(answer),
      uncertaintyOf(answer),
    ];
  };
  const head = ['Verdict', 'Requirement', 'When', 'Value', 'Limit', 'Margin', 'Numerical, 95 %'];
  return columns([head, ...answers.map(row)], ['left', 'left', 'left', 'right', 'right', 'right', 'right']);
}

const nameIn =
  (list: readonly { id: string; name: string }[]) =>
  (id: string): string => {
    const name = list.find((item) => item.id === id)?.name ?? '';
    return name === '' ? id : name;
  };

function firstTable({ part, cycle, materials }: Project, { first }: Report): string {
  const layer = nameIn(part.layers);
  const rows: string[][] = [];
  const { slowest, hottest, largestDifference, largestDifferenceInMaterial } = first;
  if (slowest !== null) {
    const stage = nameIn(cycle.stages)(slowest.stage);
    const at = formatDuration(slowest.time_s);
    rows.push([
      'Slowest point',
      `${depth(slowest.position_m)} deep, ${layer(slowest.layer)}`,
      `95 % of its change in ${stage} at ${at}`,
    ]);
  }
  if (hottest !== null) {
    const where = `${depth(hottest.position_m)} deep, ${layer(hottest.layer)}`;
    rows.push(['Hottest point', where, `${temperature(hottest.temperature_C)} at ${formatDuration(hottest.time_s)}`]);
  }
  const between = ([cold, hot]: [number, number]): string => `between ${depth(cold)} and ${depth(hot)}`;
  const differences = [
    ['Largest difference', largestDifference, 'in the part'],
    [
      'within one material',
      largestDifferenceInMaterial,
      largestDifferenceInMaterial === null ? '' : nameIn(materials)(largestDifferenceInMaterial.material),
    ],
  ] as const;
  for (const [what, found, where] of differences) {
    if (found === null) continue;
    const size = `${difference(found.value_K)} at ${formatDuration(found.time_s)}`;
    rows.push([what, `${between(found.between)}, ${where}`, size]);
  }
  return rows.length === 0 ? '  Nothing changes in this plan.\n' : columns(rows, ['left', 'left', 'left']);
}

const stagesTable = ({ stages }: Report): string =>
  columns(
    stages.map(({ name, stage, start_s, end_s }) => [
      name === '' ? stage : name,
      formatDuration(start_s),
      'to',
      formatDuration(end_s),
    ]),
    ['left', 'right', 'left', 'right'],
  );

/** "4 runs of other accuracy, order 0.93" */
const refinementOf = ({ of, runs, order }: NonNullable<Report['refinement']>[number]): string =>
  `${count(runs - 1, 'run')} of other ${of}${order === null ? '' : `, order ${formatNumber(order, { significant: 2 })}`}`;

function restTable({ energy, stability, solver, refinement, layers }: Report): string {
  const { steps, rejected, volumes, wall_s } = solver;
  const rows = [
    [
      'Energy',
      `${heat(energy.in_J)} MJ/m² in, ${heat(energy.stored_J)} MJ/m² stored; closure ${formatNumber(energy.closure, { significant: 2 })}`,
    ],
    [
      'Solver',
      `${solver.scheme} (${solver.method}), ${count(steps, 'step')}${rejected > 0 ? `, ${rejected} rejected` : ''}, ` +
        `${count(volumes, 'volume')}, ${formatNumber(1000 * wall_s, { significant: 2 })} ms`,
    ],
  ];
  if (refinement !== null) rows.push(['Uncertainty', refinement.map(refinementOf).join('; ')]);
  if (stability !== null) {
    const { explicit_limit_s, set_by } = stability;
    const layer = layers.find((entry) => entry.layer === set_by.layer)?.name ?? set_by.layer;
    const limit = `${formatNumber(explicit_limit_s, { significant: 3 })} s, set by layer ${layer} at ${depth(set_by.position_m)}`;
    rows.splice(1, 0, ['Stability', `explicit steps up to ${limit}`]);
  }
  return columns(rows, ['left', 'left']);
}
