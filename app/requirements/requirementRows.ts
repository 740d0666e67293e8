/** Rows of the requirements table: the name, the limit, where it counts, and the verdict. */
import {
  addRequirement,
  duplicateRequirement,
  moveRequirement,
  removeRequirement,
  renameRequirement,
  setLimit,
  startRequirement,
  typedAt,
} from '../commands';
import { limitKind, limitSign, requirementInWords, whereInWords, type Column, type Row, type VerdictView } from '../ui';
import type { Project, Requirement } from '../../solver/model';
import type { UnitSystem } from '../../solver/model/quantities';

export const REQUIREMENT_COLUMNS: readonly Column[] = [
  { head: '' },
  { head: 'Limit', width: '13.5%', align: 'right' },
  { head: 'Counts', width: '37%' },
  { head: 'Verdict', width: '15%' },
];

export interface RequirementContext {
  system: UnitSystem;
  /** A temperature that limits start from, °C. */
  near: number;
  verdict: (requirement: string) => VerdictView;
  /** Shows the moment that decided. */
  goTo: (requirement: string) => void;
}

export const requirementRows = (project: Project, context: RequirementContext): Row[] =>
  project.requirements.map((requirement, index) => ({
    id: requirement.id,
    label: requirement.name || `requirement ${index + 1}`,
    cells: requirementCells(project, requirement, index, context),
    insert: () => addRequirement(startRequirement(project, 'reach', context.near), index),
    duplicate: () => duplicateRequirement(project, requirement),
    move: (by) => moveRequirement(requirement, by),
    remove: () => removeRequirement(requirement),
  }));

function requirementCells(project: Project, requirement: Requirement, index: number, context: RequirementContext): Row['cells'] {
  const path = ['requirements', index];
  const limitPath = [...path, 'must', 'limit'];
  const quantity = limitKind(requirement.of);
  const verdict = context.verdict(requirement.id);
  return [
    {
      kind: 'text',
      text: requirement.name,
      placeholder: requirementInWords(requirement, project, context.system),
      path: [...path, 'name'],
      edit: (name) => renameRequirement(requirement, name),
    },
    {
      kind: 'quantity',
      spec: { name: 'Limit', quantity, bounds: quantity === 'temperatureDifference' ? { atLeast: 0 } : {} },
      value: requirement.must.limit,
      prefix: limitSign(requirement),
      typed: typedAt(project, limitPath),
      path: limitPath,
      edit: (entered) => setLimit(requirement, entered),
    },
    { kind: 'shown', text: whereInWords(requirement, project), path: [...path, 'counts'] },
    {
      kind: 'shown',
      text: verdict.word,
      sign: verdict.sign,
      muted: verdict.old || verdict.sign === 'wait',
      act: () => context.goTo(requirement.id),
    },
  ];
}
