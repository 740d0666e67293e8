/** Rows of the cycle table: a stage each. */
import {
  addStage,
  duplicateStage,
  moveStage,
  nextStage,
  removeStage,
  renameStage,
  setStageEnd,
  setStageLength,
  typedAt,
} from '../commands';
import type { Cell, Column, Row } from '../ui';
import type { LaidCycle, Project, Stage } from '../../solver/model';
import { formatDuration, type UnitSystem } from '../../solver/model/quantities';
import { courseInWords, valueAtStart } from './course';

export const STAGE_COLUMNS: readonly Column[] = [
  { head: '' },
  { head: 'Set-point', width: '27%' },
  { head: 'Ends', width: '16.5%' },
  { head: 'Length', width: '15%', align: 'right' },
  { head: 'Ends at', width: '15%', align: 'right' },
];

export const stageRows = (project: Project, laid: LaidCycle | null, system: UnitSystem): Row[] =>
  project.cycle.stages.map((stage, index) => ({
    id: stage.id,
    label: stage.name || `stage ${index + 1}`,
    cells: stageCells(project, laid, system, stage, index),
    insert: () => addStage(nextStage(project, index), index),
    duplicate: () => duplicateStage(project, stage),
    move: (by) => moveStage(stage, by),
    remove: project.cycle.stages.length === 1 ? null : () => removeStage(project, stage),
    removeRefusal: 'A cycle keeps at least one stage',
  }));

function stageCells(project: Project, laid: LaidCycle | null, system: UnitSystem, stage: Stage, index: number): Cell[] {
  const path = ['cycle', 'stages', index];
  const times = laid?.stages[index];
  const length = times === undefined ? null : times.end - times.start;
  return [
    {
      kind: 'text',
      text: stage.name,
      placeholder: `Stage ${index + 1}`,
      path: [...path, 'name'],
      edit: (name) => renameStage(stage, name),
    },
    { kind: 'shown', text: courseInWords(stage.setPoint ?? { segments: [] }, valueAtStart(laid, index, 'setPoint'), system) },
    {
      kind: 'choice',
      value: 'after' in stage.end ? 'after' : 'target',
      options: [
        { value: 'after', label: 'after a time' },
        { value: 'target', label: 'at target' },
      ],
      path: [...path, 'end'],
      edit: (end) => setStageEnd(stage, end === 'after' ? { after: length ?? 3600 } : { whenScheduleDone: true }),
    },
    'after' in stage.end
      ? {
          kind: 'quantity',
          spec: { name: 'Length of the stage', quantity: 'time', bounds: { above: 0 } },
          value: stage.end.after,
          typed: typedAt(project, [...path, 'end', 'after']),
          path: [...path, 'end', 'after'],
          edit: (entered) => setStageLength(stage, entered),
        }
      : { kind: 'shown', text: length === null ? '–' : formatDuration(length), muted: true },
    { kind: 'shown', text: times === undefined ? '–' : formatDuration(times.end), muted: true },
  ];
}
