/** The plan and its answers in plain words, the same wherever they are said. */
import { faceKind } from '../commands';
import { formatDuration, formatQuantity, type UnitSystem } from '../../solver/model/quantities';
import type { Answer, Counts, Place, Project, Requirement, Subject, Verdict } from '../../solver/model';

/** Nothing met a name: what the thing is. */
export const orKind = (name: string | undefined, kind: string): string => (name?.trim() ? name.trim() : kind);

const nameIn = (list: readonly { id: string; name: string }[], id: string, kind: string): string =>
  orKind(list.find((item) => item.id === id)?.name, kind);

export const layerName = (project: Project, id: string): string => nameIn(project.part.layers, id, 'layer');
export const stageName = (project: Project, id: string): string => nameIn(project.cycle.stages, id, 'stage');

/** "Core", "Coldest point", "Difference in one material". */
export function subjectInWords(of: Subject, project: Project): string {
  if ('probe' in of) return nameIn(project.probes, of.probe, 'probe');
  if ('point' in of) return of.point === 'coldest' ? 'Coldest point' : 'Hottest point';
  return of.difference === 'part' ? 'Difference in the part' : 'Difference in one material';
}

/** Kind of the limit of a requirement: a difference is limited in K, everything else in °C. */
export const limitKind = (of: Subject): 'temperature' | 'temperatureDifference' =>
  'difference' in of ? 'temperatureDifference' : 'temperature';

/** "≥", "≤" for a rule: on which side of its limit it is met. */
export function limitSign({ must }: Requirement): '≥' | '≤' {
  if (must.kind === 'staysBelow') return '≤';
  if (must.kind === 'staysAbove') return '≥';
  return must.sense === 'atLeast' ? '≥' : '≤';
}

/** "whole cycle", "in Heat", "within 2 h 00 min of the start of Heat", "at the end of Soak". */
export function countsInWords(counts: Counts, project: Project): string {
  switch (counts.kind) {
    case 'cycle':
      return 'whole cycle';
    case 'stage':
      return `in ${stageName(project, counts.stage)}`;
    case 'within': {
      const from = counts.from === undefined ? '' : ` of the start of ${stageName(project, counts.from)}`;
      return `within ${roundTime(counts.time)}${from}`;
    }
    case 'stageEnd':
      return `at the end of ${stageName(project, counts.stage)}`;
  }
}

/** "for 30 min, whole cycle": the rest of a requirement beside its subject and limit. */
export function whereInWords(requirement: Requirement, project: Project): string {
  const { must, counts } = requirement;
  const where = countsInWords(counts, project);
  if (must.kind === 'heldFor') return `for ${roundTime(must.duration)}, ${where}`;
  return must.kind === 'reaches' ? `once, ${where}` : `always, ${where}`;
}

export interface RequirementWords {
  /** "Core" */
  subject: string;
  /** "≥ 540 °C for 30 min": never cut where room is short. */
  limit: string;
  /** "at the end of Soak"; empty for the whole cycle, which goes without saying. */
  where: string;
}

export function requirementParts(requirement: Requirement, project: Project, system: UnitSystem): RequirementWords {
  const { of, must, counts } = requirement;
  const limit = `${limitSign(requirement)} ${formatQuantity(must.limit, limitKind(of), system).text}`;
  return {
    subject: subjectInWords(of, project),
    limit: must.kind === 'heldFor' ? `${limit} for ${roundTime(must.duration)}` : limit,
    where: counts.kind === 'cycle' ? '' : countsInWords(counts, project),
  };
}

/** "Core ≥ 540 °C for 30 min at the end of Soak". */
export function requirementInWords(requirement: Requirement, project: Project, system: UnitSystem): string {
  const { subject, limit, where } = requirementParts(requirement, project, system);
  return `${subject} ${limit}${where === '' ? '' : ` ${where}`}`;
}

/** A time that was set, without its empty minutes: "6 h". */
const roundTime = (seconds: number): string => formatDuration(seconds).replace(/ 00 (?:min|s|h)$/, '');

/** "120 mm deep", "middle of Shell", "Hot face", "Lining side of Lining / Shell". */
export function placeInWords(at: Place, project: Project, system: UnitSystem): string {
  if ('depth' in at) return `${formatQuantity(at.depth, 'length', system, { significant: 4 }).text} deep`;
  if ('face' in at) return orKind(project.part.faces[at.face].name, faceKind(project.part, at.face));
  if ('fraction' in at) {
    const where = at.layer === undefined ? 'the part' : layerName(project, at.layer);
    return at.fraction === 0.5 ? `middle of ${where}` : `${Number((at.fraction * 100).toPrecision(4))} % into ${where}`;
  }
  const index = project.part.layers.findIndex((layer) => layer.id === at.interface);
  const sides = { before: layerName(project, at.interface), after: orKind(project.part.layers[index + 1]?.name, 'layer') };
  return `${sides[at.side]} side of ${sides.before} / ${sides.after}`;
}

/** How a verdict is drawn; waiting stands for all that is not yet, or cannot be, said. */
export type SignKind = 'met' | 'thin' | 'not' | 'wait';

export const VERDICT_WORDS: Record<Verdict, string> = {
  met: 'Met',
  thin: 'Met, thin margin',
  'not-met': 'Not met',
  'never-reached': 'Never reached',
  'cannot-be-judged': 'Cannot be judged',
};

export const VERDICT_SIGNS: Record<Verdict, SignKind> = {
  met: 'met',
  thin: 'thin',
  'not-met': 'not',
  'never-reached': 'not',
  'cannot-be-judged': 'wait',
};

export interface VerdictView {
  sign: SignKind;
  word: string;
  /** What was said before the last edit, kept in sight. */
  old: boolean;
}

/** What to say of a requirement now: its verdict, or that it waits. */
export function verdictNow(answer: Answer | undefined, run: { state: string; waiting: boolean }): VerdictView {
  if (answer === undefined) {
    const word = run.state === 'failed' ? 'Not run' : run.state === 'cancelled' ? 'Stopped' : 'Not yet';
    return { sign: 'wait', word: run.state === 'solving' ? 'Solving' : word, old: false };
  }
  const verdict = { sign: VERDICT_SIGNS[answer.verdict], word: VERDICT_WORDS[answer.verdict] };
  if (!run.waiting || run.state === 'cancelled') return { ...verdict, old: false };
  return run.state === 'solving' ? { sign: 'wait', word: 'Solving', old: true } : { ...verdict, old: true };
}

/** Digits that a temperature deserves while its uncertainty is unknown: whole degrees, tenths below 10 K of margin. */
const decimalsFor = (size: number): number => (size < 9.95 ? 1 : 0);

/** Digits that a doubt in K deserves: its own first one, hundredths at the finest. */
const decimalsOf = (doubt: number): number => (doubt <= 0 ? 2 : Math.min(2, Math.max(0, -Math.floor(Math.log10(doubt)))));

/** " ± 0.4 K": half the width of the 95 % interval of the margin; empty while it is not known. */
function doubtInWords({ uncertainty, margin_unit }: Answer, system: UnitSystem): string {
  if (uncertainty === null) return '';
  if (margin_unit === 's') return ` ± ${uncertainty < 1 ? '1 s' : formatDuration(uncertainty)}`;
  const least = 0.01;
  const shown = Math.max(uncertainty, least);
  const style = { decimals: decimalsOf(shown) };
  return ` ± ${formatQuantity(shown, 'temperatureDifference', system, style).text}`;
}

/** "+3 h 44 min", "−26 K ± 0.4 K": positive is good; the doubt is the 95 % interval, once it is known. */
export function marginInWords(answer: Answer, system: UnitSystem): string {
  const { margin } = answer;
  if (margin === null) return '';
  const doubt = doubtInWords(answer, system);
  if (answer.margin_unit === 's') return `${formatDuration(margin, { sign: true })}${doubt}`;
  const decimals = answer.uncertainty === null ? decimalsFor(Math.abs(margin)) : decimalsOf(answer.uncertainty);
  return `${formatQuantity(margin, 'temperatureDifference', system, { sign: true, decimals }).text}${doubt}`;
}

/** A temperature as an answer gives it: whole degrees. */
export const temperatureInWords = (value: number, system: UnitSystem): string =>
  formatQuantity(value, 'temperature', system, { decimals: 0 }).text;

export const differenceInWords = (value: number, system: UnitSystem): string =>
  formatQuantity(value, 'temperatureDifference', system, { decimals: decimalsFor(Math.abs(value)) }).text;

export const depthInWords = (depth: number, system: UnitSystem): string =>
  formatQuantity(depth, 'length', system, { significant: 3 }).text;

/** "5 stages", "1 layer". */
export const countOf = (count: number, one: string, many = `${one}s`): string => `${count} ${count === 1 ? one : many}`;
