/** Runs a plan as the windows do: by a job over a port, so that it can be interrupted and watched. */
import { formatDuration, type Frames, type Project, type RunResult } from '../../solver/model';
import { startInProcess } from '../../solver/service';
import { createSolverClient, type AboutJob, type Answered } from '../../solver/service/protocol';
import type { Io } from './io';

/** The run, however it ended; or why there is none. */
export type Ran = { kind: 'result'; result: RunResult } | { kind: 'failed'; message: string };

export async function runPlan(project: Project, io: Io, quiet: boolean): Promise<Ran> {
  const client = createSolverClient({ start: startInProcess, after: waitFor });
  const progress = progressLine(project, io, quiet);
  const interrupt = (): void => client.cancel();
  io.signal.addEventListener('abort', interrupt);
  try {
    return await new Promise<Ran>((settle) => {
      let answered: Answered | null = null;
      let frames: Frames | null = null;
      client.listen((event) => {
        if (event.type === 'progress') progress.show(event);
        else if (event.type === 'answers' && event.final) answered = event.result;
        else if (event.type === 'frames') frames = event.frames;
        else if (event.type === 'failed') settle({ kind: 'failed', message: event.message });
        else if (event.type === 'done') {
          if (answered === null || frames === null) settle({ kind: 'failed', message: 'The solver gave no answers.' });
          else settle({ kind: 'result', result: { ...answered, frames } });
        }
      });
      client.solve([project], 0);
      if (io.signal.aborted) interrupt();
    });
  } finally {
    io.signal.removeEventListener('abort', interrupt);
    progress.clear();
    client.close();
  }
}

function waitFor(wait_ms: number, call: () => void): () => void {
  const timer = setTimeout(call, wait_ms);
  return () => clearTimeout(timer);
}

const CLEAR_LINE = '\r\x1b[K';

/** One line that is written over, where remarks go to a terminal; nothing elsewhere. */
function progressLine(project: Project, io: Io, quiet: boolean) {
  const shown = io.terminal && !quiet;
  let dirty = false;
  return {
    show({ fraction, stage, time_s, end_s, state }: Extract<AboutJob, { type: 'progress' }>): void {
      if (!shown) return;
      const name = project.cycle.stages.find(({ id }) => id === stage)?.name ?? stage;
      const part = `${Math.floor(100 * fraction)} %`.padStart(5);
      dirty = true;
      if (state === 'refining') return io.remark(`${CLEAR_LINE}Refining ${part}`);
      io.remark(`${CLEAR_LINE}Solving ${part}, ${formatDuration(time_s)} of ${formatDuration(end_s)}, stage ${name}`);
    },
    clear(): void {
      if (dirty) io.remark(CLEAR_LINE);
      dirty = false;
    },
  };
}
