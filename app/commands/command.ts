/** A user command: a name for the undo menu and a pure edit of the plan. */
import type { Project } from '../../solver/model';
import { keepTyped } from './typed';

export interface Command {
  /** As the undo menu says it: "Thickness of Shell to 12 mm". */
  readonly name: string;
  /** The plan after the edit; the same object when nothing changes. Never changes the plan it is given. */
  apply(project: Project): Project;
}

/** A number as it was entered: the value in the document's unit, how it reads on screen, and what was typed. */
export interface Entered {
  readonly value: number;
  /** For names of commands: "12 mm". */
  readonly text: string;
  /** What the person typed, only where it carries its own unit and so reads the same whatever units are shown. */
  readonly typed?: string;
}

/** Applies a command and drops what was typed for numbers that have changed. */
export function applyCommand(project: Project, command: Command): Project {
  const after = command.apply(project);
  return after === project ? project : keepTyped(project, after);
}

/** Several commands as one entry of the undo list. */
export const together = (name: string, commands: readonly Command[]): Command => ({
  name,
  apply: (project) => commands.reduce(applyCommand, project),
});

/** Names an item in a command; an item without a name is spoken of by its kind. */
export const called = (item: { name: string }, kind: string): string => (item.name.trim() === '' ? kind : item.name.trim());
