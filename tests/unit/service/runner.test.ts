import { describe, expect, it } from 'vitest';
import { newProject, type Project, type RunResult } from '../../../solver/model';
import { PROTOCOL_VERSION, readFromSolver, type FromSolver } from '../../../solver/service/protocol';
import { ANSWERS_MS, PROGRESS_MS, SLICE_MS, startRunner } from '../../../solver/service/runner';
import { manualClock } from '../../protocol/fakes';
import { fakeRefining, fakeSolving, type FakeRun } from './fakeSolving';

/** A runner on made-up time; messages wait, as on a real port, until it listens between two slices. */
function setUp(run: FakeRun | ((project: Project) => FakeRun) = { steps: 10, step_ms: 1 }, refined?: FakeRun) {
  const clock = manualClock();
  const said: (FromSolver & { at: number })[] = [];
  const transferred: ArrayBuffer[][] = [];
  const solvings: ReturnType<typeof fakeSolving>[] = [];
  const inbox: unknown[] = [];
  const faults: unknown[] = [];
  let handler: ((message: unknown) => void) | null = null;
  let turn: (() => void) | null = null;
  const runner = startRunner({
    port: {
      post(message, transfer) {
        said.push({ ...(message as FromSolver), at: clock.now() });
        if (transfer !== undefined) transferred.push(transfer);
      },
      listen(heard) {
        handler = heard;
        return () => void (handler = null);
      },
      close: () => undefined,
    },
    start(project) {
      const solving = fakeSolving(clock, typeof run === 'function' ? run(project) : run);
      solvings.push(solving);
      return solving;
    },
    ...(refined === undefined ? {} : { refine: (_: Project, base: RunResult) => fakeRefining(clock, refined, base) }),
    now: clock.now,
    later: (next) => void (turn = next),
    log: (fault) => void faults.push(fault),
  });
  const listen = (): void => {
    for (const message of inbox.splice(0)) handler?.(message);
  };
  return {
    said,
    transferred,
    solvings,
    faults,
    clock,
    runner,
    tell: (message: unknown) => void inbox.push(message),
    listen,
    /** Hears what waits, then runs one slice; false when there is nothing to do. */
    goOn(): boolean {
      listen();
      const next = turn;
      turn = null;
      next?.();
      return next !== null;
    },
    runOut(): void {
      while (this.goOn());
    },
    kinds: () => said.map((message) => (message.type === 'failed' ? `failed ${message.code}` : message.type)),
  };
}

const plan = newProject();
const solve = (job: number, cases: unknown[] = [plan], revision = job) => ({ type: 'solve', job, revision, cases });
const LONG = { steps: 2000, step_ms: 1 };

describe('a job', () => {
  it('begins after a greeting with the version', () => {
    expect(setUp().said).toMatchObject([{ type: 'ready', protocol: PROTOCOL_VERSION }]);
  });

  it('that is short gives final answers, then frames, then done, and nothing else', () => {
    const rig = setUp();
    rig.tell(solve(1));
    rig.runOut();
    expect(rig.kinds()).toEqual(['ready', 'answers', 'frames', 'done']);
    expect(rig.said[1]).toMatchObject({ job: 1, revision: 1, case: 0, final: true });
    expect(rig.said[1]).not.toHaveProperty('result.frames');
    expect(rig.said[3]).toMatchObject({ outcomes: [{ reason: 'finished', reached_s: 10 }] });
  });

  it('says only what its own protocol understands', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1));
    rig.runOut();
    for (const message of rig.said) expect(readFromSolver(message)?.type).toBe(message.type);
  });

  it('hands over the buffers of its frames, each once', () => {
    const rig = setUp();
    rig.tell(solve(1));
    rig.runOut();
    expect(rig.transferred).toHaveLength(1);
    expect(new Set(rig.transferred[0]).size).toBe(5);
  });

  it('never goes longer than a slice without listening', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1));
    rig.runOut();
    expect(rig.solvings[0].longest_ms).toBeLessThanOrEqual(SLICE_MS);
  });

  it('of several cases runs them all, in order, each with its answers and outcome', () => {
    const rig = setUp();
    rig.tell(solve(1, [plan, plan, plan]));
    rig.runOut();
    const cases = rig.said.filter((message) => message.type === 'answers').map((message) => message.case);
    expect(cases).toEqual([0, 1, 2]);
    expect(rig.said.at(-1)).toMatchObject({ type: 'done', outcomes: [{}, {}, {}] });
    expect(rig.kinds().filter((kind) => kind === 'done')).toHaveLength(1);
  });
});

describe('progress of a long job', () => {
  const progressOf = (rig: ReturnType<typeof setUp>) =>
    rig.said.flatMap((message) => (message.type === 'progress' ? [message] : []));

  it('is told at most every tenth of a second, and within half a second', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1));
    rig.runOut();
    const times = progressOf(rig).map((message) => message.at);
    expect(times.length).toBeGreaterThan(10);
    const gaps = times.map((time, index) => time - (times[index - 1] ?? 0));
    expect(Math.min(...gaps)).toBeGreaterThanOrEqual(PROGRESS_MS);
    expect(Math.max(...gaps)).toBeLessThanOrEqual(500);
  });

  it('never goes backwards, over all cases, and tells the part of the whole job', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1, [plan, plan, plan, plan]));
    rig.runOut();
    const fractions = progressOf(rig).map((message) => message.fraction);
    expect(fractions).toEqual([...fractions].sort((a, b) => a - b));
    expect(fractions[0]).toBeLessThan(0.05);
    expect(fractions.at(-1)).toBeGreaterThan(0.9);
  });

  it('comes with provisional answers at most every quarter of a second', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1));
    rig.runOut();
    const provisional = rig.said.flatMap((message) => (message.type === 'answers' && !message.final ? [message.at] : []));
    expect(provisional.length).toBeGreaterThanOrEqual(5);
    const gaps = provisional.map((time, index) => time - (provisional[index - 1] ?? 0));
    expect(Math.min(...gaps)).toBeGreaterThanOrEqual(ANSWERS_MS);
  });
});

describe('superseding and cancelling', () => {
  it('a newer job takes the place of the older within one slice', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1));
    rig.goOn();
    rig.goOn();
    rig.tell(solve(2));
    const before = rig.clock.now();
    rig.listen();
    expect(rig.kinds()).toEqual(['ready', 'failed superseded']);
    expect(rig.clock.now()).toBe(before);
    rig.runOut();
    const after = rig.said.slice(2);
    expect(after.every((message) => 'job' in message && message.job === 2)).toBe(true);
    expect(after.at(-1)?.type).toBe('done');
  });

  it('an older job that comes late is turned away, and the newer one runs on', () => {
    const rig = setUp(LONG);
    rig.tell(solve(5));
    rig.goOn();
    rig.tell(solve(4));
    rig.runOut();
    expect(rig.said.filter((message) => message.type === 'failed')).toMatchObject([{ job: 4, code: 'superseded' }]);
    expect(rig.said.at(-1)).toMatchObject({ type: 'done', job: 5 });
  });

  it('of ten edits in a row only the last is run to its end', () => {
    const rig = setUp(LONG);
    for (let job = 1; job <= 10; job++) rig.tell(solve(job));
    rig.runOut();
    expect(rig.solvings).toHaveLength(1);
    expect(rig.kinds().filter((kind) => kind === 'failed superseded')).toHaveLength(9);
    expect(rig.said.at(-1)).toMatchObject({ type: 'done', job: 10 });
  });

  it('a cancel ends the run within a slice, and what was reached is given', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1));
    for (let slice = 0; slice < 4; slice++) rig.goOn();
    const asked = rig.clock.now();
    rig.tell({ type: 'cancel', job: 1 });
    rig.runOut();
    expect(rig.clock.now() - asked).toBeLessThanOrEqual(SLICE_MS);
    expect(rig.kinds().slice(-3)).toEqual(['answers', 'frames', 'done']);
    expect(rig.said.at(-1)).toMatchObject({ outcomes: [{ reason: 'cancelled', reached_s: asked }] });
  });

  it('a cancel in the first of three cases leaves the others as never begun', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1, [plan, plan, plan]));
    rig.goOn();
    rig.tell({ type: 'cancel', job: 1 });
    rig.runOut();
    expect(rig.solvings).toHaveLength(1);
    expect(rig.said.at(-1)).toMatchObject({
      type: 'done',
      outcomes: [{ reason: 'cancelled' }, { reason: 'cancelled', reached_s: 0 }, { reason: 'cancelled', reached_s: 0 }],
    });
  });

  it('a cancel for another job is no business of this one', () => {
    const rig = setUp(LONG);
    rig.tell(solve(2));
    rig.goOn();
    rig.tell({ type: 'cancel', job: 1 });
    rig.runOut();
    expect(rig.said.at(-1)).toMatchObject({ outcomes: [{ reason: 'finished' }] });
  });

  it('a ping is answered in the middle of a run', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1));
    rig.goOn();
    rig.tell({ type: 'ping', id: 42 });
    rig.listen();
    expect(rig.said.at(-1)).toMatchObject({ type: 'pong', id: 42 });
  });
});

describe('what cannot be run', () => {
  it('a bad plan is refused with the place and what would be right', () => {
    const rig = setUp();
    const bad = structuredClone(plan);
    bad.part.layers[0].thickness = -0.004;
    rig.tell(solve(1, [bad]));
    rig.runOut();
    expect(rig.said.at(-1)).toMatchObject({ type: 'failed', job: 1, code: 'invalid-project' });
    expect(rig.said.at(-1)).toHaveProperty('message', 'part.layers[0].thickness must be more than 0 m, got -0.004');
    expect(rig.solvings).toEqual([]);
  });

  it('one bad case of several is named, and none is run', () => {
    const rig = setUp();
    rig.tell(solve(1, [plan, { ...plan, version: 99 }]));
    rig.runOut();
    expect(rig.said.at(-1)).toHaveProperty('message', expect.stringMatching(/^Case 2: Written by a newer version/));
    expect(rig.solvings).toEqual([]);
  });

  it('of very many problems only the first are worded', () => {
    const rig = setUp();
    const bad = { ...plan, probes: Array.from({ length: 30 }, (_, index) => ({ id: `p${index}`, name: 'x', at: { depth: 9 } })) };
    rig.tell(solve(1, [bad]));
    rig.runOut();
    const lines = (rig.said.at(-1) as { message: string }).message.split('\n');
    expect(lines).toHaveLength(9);
    expect(lines.at(-1)).toBe('and 22 more');
  });

  it('a fault inside fails that job without a stack, is kept for us, and the next job runs', () => {
    const rig = setUp((project) => ({ steps: 100, step_ms: 1, faultAt: project.title === 'cursed' ? 60 : undefined }));
    rig.tell(solve(1, [{ ...plan, title: 'cursed' }]));
    rig.runOut();
    const last = rig.said.at(-1) as { message: string };
    expect(last).toMatchObject({ type: 'failed', job: 1, code: 'broken' });
    expect(last.message).toContain('the matrix has no pivot');
    expect(last.message).not.toMatch(/\bat .*:\d+/);
    expect(rig.faults).toHaveLength(1);
    rig.tell(solve(2));
    rig.runOut();
    expect(rig.said.at(-1)).toMatchObject({ type: 'done', job: 2 });
  });

  it('garbage that names a job is answered, other garbage is only kept for us; the run goes on', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1));
    rig.goOn();
    for (const message of [null, 'solve', { type: 'solve', job: 7, revision: 3, cases: [] }]) rig.tell(message);
    rig.runOut();
    expect(rig.said.filter((message) => message.type === 'failed')).toMatchObject([
      { job: 7, revision: 3, code: 'not-understood' },
    ]);
    expect(rig.faults).toHaveLength(2);
    expect(rig.said.at(-1)).toMatchObject({ type: 'done', job: 1 });
  });

  it('a stopped runner hears and says nothing more', () => {
    const rig = setUp(LONG);
    rig.tell(solve(1));
    rig.goOn();
    rig.runner.stop();
    const said = rig.said.length;
    rig.tell({ type: 'ping', id: 1 });
    rig.runOut();
    expect(rig.said).toHaveLength(said);
  });
});

describe('a job whose answers get their uncertainty', () => {
  const short = { steps: 10, step_ms: 1 };
  const answers = (rig: ReturnType<typeof setUp>) => rig.said.flatMap((message) => (message.type === 'answers' ? [message] : []));

  it('gives the values first, with their frames, and ends with the uncertainties', () => {
    const rig = setUp(short, short);
    rig.tell(solve(1));
    rig.runOut();
    expect(rig.kinds()).toEqual(['ready', 'answers', 'frames', 'answers', 'done']);
    expect(answers(rig)).toMatchObject([
      { final: false, refining: true, result: { refinement: null } },
      { final: true, result: { refinement: [] } },
    ]);
    expect(answers(rig)[1]).not.toHaveProperty('refining');
    for (const message of rig.said) expect(readFromSolver(message)).not.toBeNull();
  });

  it('listens between slices of the refining, and says how far it is', () => {
    const rig = setUp(short, LONG);
    rig.tell(solve(1));
    rig.runOut();
    const progress = rig.said.flatMap((message) => (message.type === 'progress' ? [message] : []));
    expect(progress.length).toBeGreaterThan(10);
    expect(progress.every(({ state, time_s, end_s }) => state === 'refining' && time_s === end_s)).toBe(true);
    const fractions = progress.map(({ fraction }) => fraction);
    expect(fractions).toEqual([...fractions].sort((a, b) => a - b));
    for (let i = 1; i < progress.length; i++) expect(progress[i].at - progress[i - 1].at).toBeGreaterThanOrEqual(PROGRESS_MS);
  });

  it('keeps its values, and is a finished run, when it is cancelled on the way', () => {
    const rig = setUp(short, LONG);
    rig.tell(solve(1));
    for (let i = 0; i < 5; i++) rig.goOn();
    rig.tell({ type: 'cancel', job: 1 });
    rig.runOut();
    expect(rig.kinds().slice(-2)).toEqual(['answers', 'done']);
    expect(answers(rig).at(-1)).toMatchObject({ final: true, result: { refinement: null } });
    expect(rig.said.at(-1)).toMatchObject({ outcomes: [{ reason: 'finished' }] });
  });

  it('makes way for a newer job on the way', () => {
    const rig = setUp(short, LONG);
    rig.tell(solve(1));
    for (let i = 0; i < 5; i++) rig.goOn();
    rig.tell(solve(2));
    rig.goOn();
    expect(rig.said.find((message) => message.type === 'failed')).toMatchObject({ job: 1, code: 'superseded' });
    rig.runOut();
    expect(rig.said.at(-1)).toMatchObject({ type: 'done', job: 2 });
  });

  it.each([
    ['one case, nothing said', [plan], undefined, 1],
    ['one case, not wanted', [plan], false, 0],
    ['two cases, nothing said', [plan, plan], undefined, 0],
    ['two cases, wanted', [plan, plan], true, 2],
  ])('%s', (_, cases, refine, refined) => {
    const rig = setUp(short, short);
    rig.tell({ ...solve(1, cases), refine });
    rig.runOut();
    expect(answers(rig).filter(({ refining }) => refining)).toHaveLength(refined);
    expect(answers(rig).filter(({ final }) => final)).toHaveLength(cases.length);
  });
});
