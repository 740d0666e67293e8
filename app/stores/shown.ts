/** What the drawings show: the last plan that could be laid out, and whether the answers beside it are its own. */
import { defineStore } from 'pinia';
import { computed, onScopeDispose, ref, shallowRef, watch } from 'vue';
import { placeOf, type LaidCycle, type Project } from '../../solver/model';
import { useProjectStore } from './project';
import { useRunStore } from './run';

/** Answers that are late by less than this are not called stale: the note would only flicker, ms. */
const PATIENCE_MS = 300;

export const useShownStore = defineStore('shown', () => {
  const project = useProjectStore();
  const run = useRunStore();

  const last = shallowRef<{ laid: LaidCycle; plan: Project } | null>(null);
  watch(
    () => run.laid,
    (laid) => {
      if (laid !== null) last.value = { laid, plan: project.current };
    },
    { immediate: true, flush: 'sync' },
  );
  /** The cycle on the time axis, and the plan it is of; null before the first plan without problems. */
  const laid = computed(() => last.value?.laid ?? null);
  const plan = computed(() => last.value?.plan ?? null);
  /** Handles work on the plan that is drawn: there are none while a problem keeps the newest from being drawn. */
  const editable = computed(() => run.laid !== null);

  const late = ref(false);
  let timer: ReturnType<typeof setTimeout> | undefined;
  watch(
    () => run.outdated,
    (outdated) => {
      clearTimeout(timer);
      if (outdated) timer = setTimeout(() => (late.value = true), PATIENCE_MS);
      else late.value = false;
    },
    { immediate: true },
  );
  onScopeDispose(() => clearTimeout(timer));

  const problemWords = computed(() => {
    const problem = project.problems.at(0);
    return problem === undefined ? null : `${placeOf(problem.path)} ${problem.message}`;
  });
  /** Why the answers are greyed: null while they are those of the plan. */
  const staleWords = computed(() => {
    if (!late.value) return null;
    if (problemWords.value !== null) return `before a problem: ${problemWords.value}`;
    return project.draft !== null || project.undoName === null ? 'before this edit' : `before “${project.undoName}”`;
  });
  /** What stands where answers will be: null once there are some. */
  const emptyWords = computed(() => {
    if (run.result !== null) return null;
    if (problemWords.value !== null) return `Drawn once the plan can run: ${problemWords.value}.`;
    return run.state === 'failed' ? (run.message ?? 'The run could not be done.') : 'Drawn when the first run is done.';
  });

  return { laid, plan, editable, staleWords, emptyWords };
});
