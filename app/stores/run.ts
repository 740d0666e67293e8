/** The runs of the plan: asks the solver after every edit, and keeps the last answers until newer ones are complete. */
import { defineStore } from 'pinia';
import { computed, shallowRef, watch } from 'vue';
import { layCycle, type Frames, type LaidCycle, type Outcome, type Project, type Stability } from '../../solver/model';
import type { Answered, ClientEvent, SolverClient } from '../../solver/service/protocol';
import { useProjectStore } from './project';

/**
 * idle: nothing was asked yet; solving: a job runs; live: the answers are those of the plan on screen; stale: they are of an
 * earlier one; failed: the run could not be done, or not to its end; cancelled: stopped by the person.
 */
export type RunState = 'idle' | 'solving' | 'live' | 'stale' | 'failed' | 'cancelled';

export interface Progress {
  fraction: number;
  time_s: number;
  end_s: number;
  stage: string;
  /** Seconds left by the pace so far; null until there is a pace. */
  left_s: number | null;
}

/** Pause in typing after which the plan is solved, ms. */
const DEBOUNCE_MS = 60;
/** A drag never pauses: it is solved at least this often, ms. */
const LONGEST_WAIT_MS = 120;
/** Waiting shorter than this is not shown: answers that come at once must not flicker, ms. */
const SHOW_WAITING_MS = 200;

/** The answers as last complete, what they answer, and their frames. */
interface Complete {
  result: Answered;
  frames: Frames | null;
  project: Project;
}

export const useRunStore = defineStore('run', () => {
  const project = useProjectStore();
  const complete = shallowRef<Complete | null>(null);
  const state = shallowRef<RunState>('idle');
  const progress = shallowRef<Progress | null>(null);
  const solveMs = shallowRef<number | null>(null);
  /** What to tell the person about the last run: why it failed or stopped, or that the solver was started again. */
  const message = shallowRef<string | null>(null);
  /** How the last job ended; carries the remedy of a refused step. */
  const outcome = shallowRef<Outcome | null>(null);
  const stability = shallowRef<Stability | null>(null);

  const result = computed(() => complete.value?.result ?? null);
  const frames = computed(() => complete.value?.frames ?? null);
  /** The plan that `result` and `frames` are of. */
  const solved = computed(() => complete.value?.project ?? null);
  /** The cycle of the plan on screen on the time axis; null while a problem keeps the plan from running. */
  const laid = computed<LaidCycle | null>(() => (project.problems.length > 0 ? null : layCycle(project.current)));
  /** The answers are not those of the plan on screen. */
  const outdated = computed(() => solved.value !== null && solved.value !== project.current);

  /** The answers have been out of date for long enough to say so. */
  const waiting = shallowRef(false);
  let waitingTimer: ReturnType<typeof setTimeout> | undefined;
  watch(
    state,
    (now, before) => {
      if (now === 'live') {
        clearTimeout(waitingTimer);
        waiting.value = false;
      } else if (before === 'live' || before === undefined) {
        waitingTimer = setTimeout(() => (waiting.value = true), SHOW_WAITING_MS);
      }
    },
    { flush: 'sync', immediate: true },
  );

  let client: SolverClient | null = null;
  /** The newest job; whatever an older one still says is dropped. */
  let asked: { project: Project; job: number; at: number } | null = null;
  let gathered: { result: Answered | null; frames: Frames | null } = { result: null, frames: null };
  /** Whether the run in hand is over and only its uncertainty is still to come. */
  let refining = false;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let waitingSince: number | null = null;
  /** The document whose answers are on screen: answers of another document are never kept. */
  let documentShown = -1;

  function planChanged(): void {
    if (documentShown !== project.opened) forget();
    clearTimeout(timer);
    message.value = null;
    progress.value = null;
    if (solved.value === project.current && outcome.value?.reason === 'finished') {
      stopAsking();
      state.value = 'live';
      return;
    }
    state.value = complete.value === null ? 'idle' : 'stale';
    if (project.problems.length > 0) return stopAsking();
    waitingSince ??= performance.now();
    const longest = LONGEST_WAIT_MS - (performance.now() - waitingSince);
    timer = setTimeout(ask, complete.value === null ? 0 : Math.max(0, Math.min(DEBOUNCE_MS, longest)));
  }

  function forget(): void {
    documentShown = project.opened;
    complete.value = null;
    outcome.value = null;
    stability.value = null;
    solveMs.value = null;
  }

  function stopAsking(): void {
    waitingSince = null;
    asked = null;
    if (client?.busy()) client.cancel();
  }

  function ask(): void {
    waitingSince = null;
    if (client === null || project.problems.length > 0) return;
    const plan = project.current;
    gathered = { result: null, frames: null };
    refining = false;
    asked = { project: plan, job: -1, at: performance.now() };
    state.value = 'solving';
    message.value = null;
    progress.value = null;
    asked.job = client.solve([plan], project.revision);
  }

  function hear(event: ClientEvent): void {
    if (event.type === 'restarted') {
      message.value = event.message;
      return;
    }
    if (asked === null || event.job !== asked.job) return;
    switch (event.type) {
      case 'progress':
        // Values stand already; only their doubt is still on the way.
        if (event.state !== 'refining') progress.value = progressOf(event, performance.now() - asked.at);
        return;
      case 'answers':
        gathered.result = event.result;
        refining = event.refining === true;
        if (complete.value === null && !event.final)
          complete.value = { ...gathered, result: event.result, project: asked.project };
        return;
      case 'frames':
        gathered.frames = event.frames;
        if (refining) settled();
        return;
      case 'done':
        return ended(event.outcomes[0]);
      case 'failed':
        asked = null;
        progress.value = null;
        state.value = event.code === 'cancelled' ? 'cancelled' : 'failed';
        message.value = event.message;
    }
  }

  /** The run is over and its values stand: they are shown at once, before their uncertainty is known. */
  function settled(): void {
    const { project: plan, at } = asked as { project: Project; at: number };
    if (gathered.result === null) return;
    complete.value = { result: gathered.result, frames: gathered.frames, project: plan };
    stability.value = gathered.result.stability;
    progress.value = null;
    solveMs.value = performance.now() - at;
    if (plan === project.current) state.value = 'live';
  }

  /** Takes over what the run came to: all of it, or as far as it went; a refused run leaves the earlier answers. */
  function ended(how: Outcome): void {
    const { project: plan, at } = asked as { project: Project; at: number };
    asked = null;
    progress.value = null;
    outcome.value = how;
    if (state.value !== 'live') solveMs.value = performance.now() - at;
    if (gathered.result !== null) {
      stability.value = gathered.result.stability;
      if (how.reason === 'finished' || how.reached_s > 0 || complete.value === null) {
        complete.value = { result: gathered.result, frames: gathered.frames, project: plan };
      }
    }
    gathered = { result: null, frames: null };
    // The plan went on while this ran, as it does under a drag: nearer than what was there, but stale.
    if (plan !== project.current) return;
    message.value = how.message;
    state.value = how.reason === 'finished' ? 'live' : how.reason === 'cancelled' ? 'cancelled' : 'failed';
  }

  watch(() => [project.revision, project.opened], planChanged, { flush: 'sync' });

  return {
    result,
    frames,
    solved,
    laid,
    outdated,
    waiting,
    state,
    progress,
    solveMs,
    message,
    outcome,
    stability,
    /** Takes a solver into use and asks it for the plan on screen; returns what lets go of it. */
    connect(solver: SolverClient): () => void {
      client = solver;
      const stop = solver.listen(hear);
      planChanged();
      return () => {
        stop();
        clearTimeout(timer);
        client = null;
      };
    },
    /** Stops the run; what it reached is kept and marked. */
    cancel: () => client?.cancel(),
    /** Runs the plan on screen again, after a failure or a stop. */
    again: () => {
      clearTimeout(timer);
      ask();
    },
  };
});

function progressOf(event: Extract<ClientEvent, { type: 'progress' }>, elapsedMs: number): Progress {
  const { fraction, time_s, end_s, stage } = event;
  const left = fraction > 0.02 ? ((elapsedMs / 1000) * (1 - fraction)) / fraction : null;
  return { fraction, time_s, end_s, stage, left_s: left };
}
