/** The plan being edited: what is kept, what is only tried while typing or dragging, and the way back. */
import { defineStore } from 'pinia';
import { computed, shallowRef } from 'vue';
import type { FileRef } from '../bridge/contract';
import { applyCommand, type Command } from '../commands';
import {
  crossCheck,
  newProject,
  placeOf,
  problemsOf,
  projectSchema,
  type Path,
  type Problem,
  type Project,
} from '../../solver/model';

/** One edit: its name, and the plan on both sides of it. Undo is a swap. */
interface Edit {
  readonly name: string;
  readonly before: Project;
  readonly after: Project;
}

/** Everything that is wrong with a plan; empty when it can be run. */
export function problemsIn(project: Project): Problem[] {
  const checked = projectSchema.safeParse(project);
  return checked.success ? crossCheck(project) : problemsOf(checked.error.issues, project);
}

const same = (a: Project, b: Project): boolean => a === b || JSON.stringify(a) === JSON.stringify(b);

export const useProjectStore = defineStore('project', () => {
  const committed = shallowRef<Project>(newProject());
  /** The plan as it would be with what is being typed or dragged; files and the journal never hold it. */
  const draft = shallowRef<Project | null>(null);
  let draftName = '';
  const past = shallowRef<readonly Edit[]>([]);
  const future = shallowRef<readonly Edit[]>([]);
  const saved = shallowRef<Project | null>(committed.value);
  const file = shallowRef<FileRef | null>(null);
  /** Rises whenever `current` becomes another plan. */
  const revision = shallowRef(0);
  /** Rises whenever another document is opened or begun. */
  const opened = shallowRef(0);

  const current = computed(() => draft.value ?? committed.value);
  const edited = computed(() => committed.value !== saved.value);
  const undoName = computed(() => past.value.at(-1)?.name ?? null);
  const redoName = computed(() => future.value.at(-1)?.name ?? null);
  /** What keeps `current` from running, in document order. */
  const problems = computed(() => problemsIn(current.value));
  const problemsByPlace = computed(() => {
    const places = new Map<string, string>();
    for (const problem of problems.value) {
      const place = placeOf(problem.path);
      if (!places.has(place)) places.set(place, problem.message);
    }
    return places;
  });

  /** What is wrong with the value at a path, if anything. */
  const problemAt = (path: Path): string | undefined => problemsByPlace.value.get(placeOf(path));

  function show(next: { committed?: Project; draft: Project | null }): void {
    const before = current.value;
    if (next.committed !== undefined) committed.value = next.committed;
    draft.value = next.draft;
    if (current.value !== before) revision.value++;
  }

  /** Makes an edit. What was tried before it is dropped; an edit that changes nothing is not kept. */
  function commit(command: Command): void {
    const before = committed.value;
    let after = applyCommand(before, command);
    if (draft.value !== null && same(draft.value, after)) after = draft.value;
    if (after === before || same(before, after)) return dropDraft();
    past.value = [...past.value, { name: command.name, before, after }];
    future.value = [];
    show({ committed: after, draft: null });
  }

  /** Shows what an edit would do, without making it. Each try starts from the committed plan. */
  function tryDraft(command: Command): void {
    const tried = applyCommand(committed.value, command);
    draftName = command.name;
    show({ draft: tried === committed.value ? null : tried });
  }

  /** Makes the edit that is being tried: one entry, however long it was dragged. */
  function commitDraft(): void {
    const tried = draft.value;
    if (tried !== null) commit({ name: draftName, apply: () => tried });
  }

  function dropDraft(): void {
    if (draft.value !== null) show({ draft: null });
  }

  function undo(): void {
    const edit = past.value.at(-1);
    if (edit === undefined) return dropDraft();
    past.value = past.value.slice(0, -1);
    future.value = [...future.value, edit];
    show({ committed: edit.before, draft: null });
  }

  function redo(): void {
    const edit = future.value.at(-1);
    if (edit === undefined) return;
    future.value = future.value.slice(0, -1);
    past.value = [...past.value, edit];
    show({ committed: edit.after, draft: null });
  }

  function replace(project: Project, ref: FileRef | null, asSaved: boolean): void {
    past.value = [];
    future.value = [];
    file.value = ref;
    saved.value = asSaved ? project : null;
    show({ committed: project, draft: null });
    opened.value++;
  }

  return {
    committed,
    draft,
    current,
    revision,
    opened,
    edited,
    file,
    undoName,
    redoName,
    problems,
    problemAt,
    commit,
    tryDraft,
    commitDraft,
    dropDraft,
    undo,
    redo,
    newPlan: () => replace(newProject(), null, true),
    open: (project: Project, ref: FileRef | null) => replace(project, ref, true),
    /** Unsaved work from the journal: edited from the start, and without a file until it is saved. */
    restore: (project: Project) => replace(project, null, false),
    /** The plan that was written is the saved one, even if edits came in between. */
    markSaved: (ref: FileRef, written: Project = committed.value) => {
      file.value = ref;
      saved.value = written;
    },
  };
});
