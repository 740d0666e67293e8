/** Figures of answers in words, the same on every command. */
import { formatDuration, formatNumber, type Report, type Requirement, type Verdict } from '../../solver/model';

/** An answer as reports have it. */
export type Answer = Report['answers'][number];

export const VERDICT_WORDS: Readonly<Record<Verdict, string>> = {
  met: 'met',
  thin: 'met, thin margin',
  'not-met': 'not met',
  'never-reached': 'never reached',
  'cannot-be-judged': 'cannot be judged',
};

/** Verdicts that `check` lets pass. */
export const passes = (verdict: Verdict): boolean => verdict === 'met' || verdict === 'thin';

const NOTHING = '–';

export const temperature = (value_C: number): string => `${formatNumber(value_C, { decimals: 1 })} °C`;
export const difference = (value_K: number, sign = false): string => `${formatNumber(value_K, { decimals: 1, sign })} K`;
/** Millimetres: parts are measured in them. */
export const depth = (value_m: number): string => `${formatNumber(1000 * value_m, { significant: 4 })} mm`;
export const heat = (value_J: number): string => formatNumber(value_J / 1e6, { significant: 5 });

function amount(value: number | null, unit: Answer['unit']): string {
  if (value === null) return NOTHING;
  if (unit === 's') return formatDuration(value);
  return unit === 'K' ? difference(value) : temperature(value);
}

export const valueOf = ({ value, unit }: Answer): string => amount(value, unit);

/** "≥ 540.0 °C"; a hold's limit is its duration: "≥ 30 min". */
export function limitOf({ limit, unit }: Answer, must: Requirement['must'] | undefined): string {
  const atMost = unit !== 's' && (must?.kind === 'staysBelow' || (must?.kind === 'reaches' && must.sense === 'atMost'));
  return `${atMost ? '≤' : '≥'} ${amount(limit, unit)}`;
}

export function marginOf({ margin, margin_unit }: Answer): string {
  if (margin === null) return NOTHING;
  return margin_unit === 's' ? formatDuration(margin, { sign: true }) : difference(margin, true);
}

/** Half the width of the 95 % interval of the margin: "± 0.012 K". */
export function uncertaintyOf({ uncertainty, margin_unit }: Answer): string {
  if (uncertainty === null) return NOTHING;
  const figures = formatNumber(uncertainty, { significant: 2 });
  return `± ${margin_unit === 's' && uncertainty >= 60 ? formatDuration(uncertainty) : `${figures} ${margin_unit}`}`;
}

/** "at 28 h 00 min, Hold"; the place too where a point of the part decided. */
export function whenOf({ time_s, stage, position_m }: Answer, stageName: (id: string) => string): string {
  if (time_s === null || stage === null) return NOTHING;
  const where = position_m === null ? '' : `, ${depth(position_m)} deep`;
  return `at ${formatDuration(time_s)}, ${stageName(stage)}${where}`;
}
