/** Rows of the requirement lane: spans of the time axis, and what is said beside them. */
import { type Answer, type LaidCycle, type Project, type Requirement, type Span, type Verdict } from '../../solver/model';
import { formatDuration, type UnitSystem } from '../../solver/model/quantities';
import type { Answered } from '../../solver/service/protocol';
import { differenceInWords, temperatureInWords, VERDICT_WORDS } from '../ui';
import { countingWindow } from './series';

export interface BarNote {
  /** Cycle time that it speaks of, s; it stands after it, or before where there is no room. */
  time: number;
  /** Where the coloured piece begins that the note belongs to: it stands before this if not after `time`. */
  from: number;
  text: string;
  tone: 'plain' | 'met' | 'not';
}

export interface BarRow {
  requirement: string;
  name: string;
  verdict: Verdict | 'waiting';
  spans: Span[];
  note: BarNote | null;
  /** Where the deciding figure lies: a small mark on the row; null where a span shows it already. */
  mark: number | null;
  /** What the row shows, for those who do not see it. */
  sentence: string;
}

/** A row a requirement, in the order of the plan. Without an answer the row waits, and shows only where it counts. */
export function barRows(project: Project, laid: LaidCycle, result: Answered | null, system: UnitSystem): BarRow[] {
  return project.requirements.map((requirement) => {
    const answer = result?.answers.find((item) => item.requirement === requirement.id) ?? null;
    return answer === null ? waitingRow(requirement, laid) : answeredRow(requirement, answer, system);
  });
}

function waitingRow(requirement: Requirement, laid: LaidCycle): BarRow {
  const [from_s, to_s] = countingWindow(requirement, laid);
  const { id, name } = requirement;
  const spans: Span[] = [{ from_s, to_s, kind: 'counting' }];
  return { requirement: id, name, verdict: 'waiting', spans, note: null, mark: null, sentence: `${name}: waiting for an answer` };
}

function answeredRow(requirement: Requirement, answer: Answer, system: UnitSystem): BarRow {
  const note = noteOf(requirement, answer, system);
  const covered = answer.spans.some(
    ({ kind, from_s, to_s }) =>
      (kind === 'fulfilled' || kind === 'violated') && answer.time_s !== null && answer.time_s >= from_s && answer.time_s <= to_s,
  );
  const when = answer.time_s === null ? '' : ` at ${formatDuration(answer.time_s)}`;
  return {
    requirement: requirement.id,
    name: requirement.name,
    verdict: answer.verdict,
    spans: looksOf(requirement, answer.spans),
    note,
    mark: covered ? null : answer.time_s,
    sentence: `${requirement.name}: ${VERDICT_WORDS[answer.verdict].toLowerCase()}${when}${note === null ? '' : `, ${note.text}`}`,
  };
}

/** A limit that is kept is a quiet tint all along; solid is what was asked for and came true. */
const looksOf = ({ must }: Requirement, spans: readonly Span[]): Span[] =>
  spans.map((span) =>
    span.kind === 'fulfilled' && (must.kind === 'staysBelow' || must.kind === 'staysAbove') ? { ...span, kind: 'holding' } : span,
  );

/** One short remark a row: how long a limit was broken, when it was met, or how close it came. */
function noteOf({ must }: Requirement, answer: Answer, system: UnitSystem): BarNote | null {
  const violated = answer.spans.filter(({ kind }) => kind === 'violated');
  if (violated.length > 0) {
    const length = violated.reduce((sum, { from_s, to_s }) => sum + to_s - from_s, 0);
    const word = must.kind === 'staysAbove' ? 'under' : 'over';
    const last = violated[violated.length - 1];
    return { time: last.to_s, from: last.from_s, text: `${word} for ${formatDuration(length)}`, tone: 'not' };
  }
  const fulfilled = answer.spans.findLast(({ kind }) => kind === 'fulfilled');
  if (answer.met === true && must.kind === 'heldFor' && fulfilled !== undefined) {
    return { time: fulfilled.to_s, from: fulfilled.from_s, text: `held from ${formatDuration(fulfilled.from_s)}`, tone: 'met' };
  }
  if (answer.time_s !== null && answer.met === true && must.kind === 'reaches') {
    return { time: answer.time_s, from: answer.time_s, text: `reached ${formatDuration(answer.time_s)}`, tone: 'met' };
  }
  if (answer.value === null || answer.time_s === null) return null;
  const value =
    answer.unit === 's'
      ? formatDuration(answer.value)
      : (answer.unit === 'K' ? differenceInWords : temperatureInWords)(answer.value, system);
  const words = answer.unit === 's' ? 'longest' : 'closest';
  return { time: answer.time_s, from: answer.time_s, text: `${words} ${value}`, tone: answer.met === false ? 'not' : 'plain' };
}
