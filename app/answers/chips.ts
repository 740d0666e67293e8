/** What the answers strip says: a chip a requirement, worst first where not all fit, and the sentence of a change. */
import {
  marginInWords,
  orKind,
  requirementInWords,
  requirementParts,
  VERDICT_WORDS,
  verdictNow,
  type RequirementWords,
  type SignKind,
  type VerdictView,
} from '../ui';
import type { Answer, Project, Requirement } from '../../solver/model';
import { formatDuration, formatQuantity, type UnitSystem } from '../../solver/model/quantities';

export interface ChipView extends VerdictView {
  id: string;
  name: string;
  rule: string;
  parts: RequirementWords;
  answer: Answer | undefined;
  /** "worst at", "closest at": before the time; empty where the time is when it was met. */
  lead: string;
  when: string;
  margin: string;
  /** Under the verdict, where there is no margin to draw. */
  remark: string;
}

export interface ChipContext {
  project: Project;
  answers: readonly Answer[];
  run: { state: string; waiting: boolean };
  system: UnitSystem;
}

export function chipOf(requirement: Requirement, { project, answers, run, system }: ChipContext): ChipView {
  const answer = answers.find((item) => item.requirement === requirement.id);
  const rule = requirementInWords(requirement, project, system);
  return {
    id: requirement.id,
    name: orKind(requirement.name, rule),
    rule,
    parts: requirementParts(requirement, project, system),
    answer,
    ...verdictNow(answer, run),
    ...whenOf(requirement, answer),
    margin: answer === undefined ? '' : marginInWords(answer, system),
    remark: remarkOf(answer, system),
  };
}

function whenOf({ must }: Requirement, answer: Answer | undefined): { lead: string; when: string } {
  if (answer?.time_s === null || answer?.time_s === undefined) return { lead: '', when: '' };
  const when = formatDuration(answer.time_s);
  const aims = must.kind === 'reaches' || must.kind === 'heldFor';
  if (answer.met === true) return { lead: aims ? '' : 'closest at', when };
  return { lead: aims ? 'best at' : 'worst at', when };
}

function remarkOf(answer: Answer | undefined, system: UnitSystem): string {
  if (answer === undefined) return '';
  if (answer.verdict === 'cannot-be-judged') return 'The run ended before.';
  if (answer.value === null || answer.margin !== null) return '';
  const kind = answer.unit === 's' ? 'time' : answer.unit === 'K' ? 'temperatureDifference' : 'temperature';
  const value = formatQuantity(answer.value, kind, system, kind === 'time' ? {} : { decimals: 0 }).text;
  return answer.unit === 's' ? `held for ${value} at most` : `came to ${value}`;
}

const RANK: Record<SignKind, number> = { not: 0, thin: 1, wait: 2, met: 3 };

/** The chips that are shown and those behind the count; in the plan's order if all fit, else worst first. */
export function fitChips(chips: readonly ChipView[], room: number): { shown: ChipView[]; rest: ChipView[] } {
  if (chips.length <= room) return { shown: [...chips], rest: [] };
  const sorted = [...chips].sort((a, b) => RANK[rankedSign(a)] - RANK[rankedSign(b)]);
  return { shown: sorted.slice(0, room), rest: sorted.slice(room) };
}

/** A chip keeps its place while it is solved again: it is ranked by its last verdict. */
const rankedSign = ({ answer, sign }: ChipView): SignKind =>
  answer === undefined ? sign : verdictNow(answer, { state: 'live', waiting: false }).sign;

/** How many of each sign: "2 not met, 9 met". */
export function countSigns(chips: readonly ChipView[]): { sign: SignKind; count: number }[] {
  return (['not', 'thin', 'wait', 'met'] as const)
    .map((sign) => ({ sign, count: chips.filter((chip) => rankedSign(chip) === sign).length }))
    .filter(({ count }) => count > 0);
}

/** What to say aloud when verdicts became others; empty when none did. Requirements new to the list are not a change. */
export function verdictChanges(
  before: ReadonlyMap<string, string>,
  requirements: readonly Requirement[],
  context: ChipContext,
): string {
  return requirements
    .flatMap((requirement) => {
      const answer = context.answers.find((item) => item.requirement === requirement.id);
      const was = before.get(requirement.id);
      if (answer === undefined || was === undefined || was === answer.verdict) return [];
      const chip = chipOf(requirement, context);
      const margin = chip.margin === '' ? '' : `, margin ${chip.margin}`;
      return [`${chip.name}: ${VERDICT_WORDS[answer.verdict].toLowerCase()}${margin}.`];
    })
    .join(' ');
}
