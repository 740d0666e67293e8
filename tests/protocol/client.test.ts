import { describe, expect, it } from 'vitest';
import { newProject } from '../../solver/model';
import { createSolverClient, PROTOCOL_VERSION, SILENCE_S, START_S, type ClientEvent } from '../../solver/service/protocol';
import { anyFrames, anyResult, manualClock, settle, solverShop } from './fakes';

function setUp(options: Parameters<typeof solverShop>[0] = {}) {
  const clock = manualClock();
  const shop = solverShop(options);
  const client = createSolverClient({ start: shop.start, after: clock.after });
  const events: ClientEvent[] = [];
  client.listen((event) => void events.push(event));
  const kinds = (): string[] => events.map((event) => ('code' in event ? `${event.type} ${event.code}` : event.type));
  return { clock, shop, client, events, kinds };
}

const plan = newProject();
const progress = (job: number, fraction = 0.1) => ({
  type: 'progress',
  job,
  revision: 1,
  case: 0,
  time_s: 1,
  end_s: 10,
  stage: 's1',
  fraction,
});
const done = (job: number) => ({
  type: 'done',
  job,
  revision: 1,
  outcomes: [{ reason: 'finished', reached_s: 10, stage: null, message: null }],
});

describe('a job', () => {
  it('is sent only after the solver has said its version', async () => {
    const { shop, client } = setUp({ greeting: null });
    client.solve([plan], 1);
    await settle();
    expect(shop.all[0].told).toEqual([]);
    shop.all[0].say(progress(1));
    expect(shop.all[0].told).toEqual([]);
    shop.all[0].say({ type: 'ready', protocol: PROTOCOL_VERSION });
    expect(shop.all[0].told).toEqual([{ type: 'solve', job: 1, revision: 1, cases: [plan] }]);
  });

  it('passes on all that is said about it, and is over with done', async () => {
    const { shop, client, kinds } = setUp();
    client.solve([plan], 1);
    await settle();
    const [solver] = shop.all;
    solver.say(progress(1));
    solver.say({ type: 'answers', job: 1, revision: 1, case: 0, final: true, result: anyResult });
    solver.say({ type: 'frames', job: 1, revision: 1, case: 0, frames: anyFrames });
    expect(client.busy()).toBe(true);
    solver.say(done(1));
    expect(kinds()).toEqual(['progress', 'answers', 'frames', 'done']);
    expect(client.busy()).toBe(false);
  });

  it('uses the solver that is there already', async () => {
    const { shop, client } = setUp();
    client.solve([plan], 1);
    await settle();
    shop.all[0].say(done(1));
    client.solve([plan], 2);
    expect(shop.all).toHaveLength(1);
    expect(shop.all[0].told.at(-1)).toMatchObject({ type: 'solve', job: 2, revision: 2 });
  });

  it('superseded by a newer one ends there, and nothing more of it is passed on', async () => {
    const { shop, client, events, kinds } = setUp();
    client.solve([plan], 1);
    await settle();
    client.solve([plan], 2);
    const [solver] = shop.all;
    solver.say(progress(1));
    solver.say({ type: 'failed', job: 1, revision: 1, code: 'superseded', message: 'late' });
    solver.say(done(1));
    expect(kinds()).toEqual(['failed superseded']);
    expect(client.busy()).toBe(true);
    solver.say(done(2));
    expect(events.at(-1)).toMatchObject({ type: 'done', job: 2 });
  });

  it('asked for while the solver starts is sent once, in its newest revision', async () => {
    const { shop, client } = setUp();
    client.solve([plan], 1);
    client.solve([plan], 2);
    await settle();
    expect(shop.all).toHaveLength(1);
    expect(shop.all[0].told).toEqual([{ type: 'solve', job: 2, revision: 2, cases: [plan] }]);
  });

  it('passes over garbage and messages without a job of ours', async () => {
    const { shop, client, events } = setUp();
    client.solve([plan], 1);
    await settle();
    const garbage = [null, 7, 'done', {}, { type: 'done' }, { type: 'done', job: 1, revision: 1 }, { type: 'bye', job: 1 }];
    for (const message of garbage) shop.all[0].say(message);
    shop.all[0].say(progress(77));
    expect(events).toEqual([]);
    expect(client.busy()).toBe(true);
  });
});

describe('cancelling', () => {
  it('asks the solver and waits for its done', async () => {
    const { shop, client, kinds } = setUp();
    const job = client.solve([plan], 1);
    await settle();
    client.cancel();
    expect(shop.all[0].told.at(-1)).toEqual({ type: 'cancel', job });
    expect(client.busy()).toBe(true);
    shop.all[0].say(done(job));
    expect(kinds()).toEqual(['done']);
  });

  it('before the solver is up ends the job at once, and it is never sent', async () => {
    const { shop, client, kinds } = setUp();
    client.solve([plan], 1);
    client.cancel();
    expect(kinds()).toEqual(['failed cancelled']);
    await settle();
    expect(shop.all[0].told).toEqual([]);
  });

  it('keeps a job from being repeated when the solver dies meanwhile', async () => {
    const { shop, client, kinds } = setUp();
    client.solve([plan], 1);
    await settle();
    client.cancel();
    shop.all[0].die();
    await settle();
    expect(kinds()).toEqual(['failed cancelled']);
    expect(shop.all).toHaveLength(1);
  });

  it('does nothing when nothing runs', () => {
    const { client, events } = setUp();
    client.cancel();
    expect(events).toEqual([]);
  });
});

describe('a solver that dies', () => {
  it('is started again, said so, and given the job once more', async () => {
    const { shop, client, events, kinds } = setUp();
    client.solve([plan], 1);
    await settle();
    shop.all[0].die();
    await settle();
    expect(events).toMatchObject([{ type: 'restarted', code: 'solver-gone', repeated: true }]);
    expect(shop.all[1].told).toMatchObject([{ type: 'solve', job: 1 }]);
    shop.all[1].say(done(1));
    expect(kinds()).toEqual(['restarted solver-gone', 'done']);
  });

  it('twice in one job fails the job, which is not tried a third time', async () => {
    const { shop, client, kinds } = setUp();
    client.solve([plan], 1);
    await settle();
    shop.all[0].die();
    await settle();
    shop.all[1].die();
    await settle();
    expect(kinds()).toEqual(['restarted solver-gone', 'failed solver-gone']);
    expect(client.busy()).toBe(false);
    expect(shop.all).toHaveLength(2);
  });

  it('twice is started again with the next job, which has its own second try', async () => {
    const { shop, client, kinds } = setUp();
    client.solve([plan], 1);
    for (const index of [0, 1]) {
      await settle();
      shop.all[index].die();
    }
    client.solve([plan], 2);
    await settle();
    expect(shop.all[2].told).toMatchObject([{ type: 'solve', job: 2 }]);
    shop.all[2].die();
    await settle();
    expect(shop.all[3].told).toMatchObject([{ type: 'solve', job: 2 }]);
    expect(kinds()).toEqual(['restarted solver-gone', 'failed solver-gone', 'restarted solver-gone']);
  });

  it('has no say any more', async () => {
    const { shop, client, kinds } = setUp();
    client.solve([plan], 1);
    await settle();
    shop.all[0].die();
    shop.all[0].say(done(1));
    shop.all[0].die();
    expect(kinds()).toEqual(['restarted solver-gone']);
    expect(client.busy()).toBe(true);
  });

  it('while idle is started again once, without a job', async () => {
    const { shop, client, events } = setUp();
    client.solve([plan], 1);
    await settle();
    shop.all[0].say(done(1));
    shop.all[0].die();
    await settle();
    expect(events.at(-1)).toMatchObject({ type: 'restarted', repeated: false });
    expect(shop.all[1].told).toEqual([]);
    shop.all[1].die();
    await settle();
    expect(shop.all).toHaveLength(2);
  });

  it('at its start is tried twice, then reported', async () => {
    const { client, kinds } = setUp({ startFails: 2 });
    client.solve([plan], 1);
    await settle();
    expect(kinds()).toEqual(['restarted not-started', 'failed not-started']);
  });
});

describe('a solver that hangs', () => {
  it('is killed after five seconds of silence and the job repeated', async () => {
    const { clock, shop, client, kinds } = setUp();
    client.solve([plan], 1);
    await settle();
    clock.pass(SILENCE_S * 1000 - 1);
    expect(shop.all[0].killed).toBe(false);
    clock.pass(1);
    expect(shop.all[0].killed).toBe(true);
    await settle();
    expect(kinds()).toEqual(['restarted solver-silent']);
    expect(shop.all[1].told).toMatchObject([{ type: 'solve', job: 1 }]);
  });

  it('twice in one job fails the job', async () => {
    const { clock, client, kinds } = setUp();
    client.solve([plan], 1);
    await settle();
    clock.pass(SILENCE_S * 1000);
    await settle();
    clock.pass(SILENCE_S * 1000);
    expect(kinds()).toEqual(['restarted solver-silent', 'failed solver-silent']);
  });

  it('is told from one that is only slow to speak: it is asked, and its answer counts', async () => {
    const { clock, shop, client, events } = setUp();
    client.solve([plan], 1);
    await settle();
    for (let second = 0; second < 60; second++) {
      clock.pass(1000);
      const last = shop.all[0].told.at(-1) as { type: string; id: number };
      if (last.type === 'ping') shop.all[0].say({ type: 'pong', id: last.id });
    }
    expect(shop.all[0].killed).toBe(false);
    expect(events).toEqual([]);
  });

  it('is told from a window that slept, and had no chance to hear', async () => {
    const { clock, shop, client } = setUp();
    client.solve([plan], 1);
    await settle();
    clock.sleep(8 * 3600_000);
    shop.all[0].say(progress(1));
    clock.pass(SILENCE_S * 1000 - 1);
    expect(shop.all[0].killed).toBe(false);
    clock.pass(1);
    expect(shop.all[0].killed).toBe(true);
  });

  it('is not suspected while idle', async () => {
    const { clock, shop, client } = setUp();
    client.solve([plan], 1);
    await settle();
    shop.all[0].say(done(1));
    clock.pass(3600_000);
    expect(shop.all[0].killed).toBe(false);
    expect(clock.pending()).toBe(0);
  });

  it('before its first word is given more time, then up', async () => {
    const { clock, client, kinds } = setUp({ greeting: null });
    client.solve([plan], 1);
    await settle();
    clock.pass(START_S * 1000 - 1);
    expect(kinds()).toEqual([]);
    clock.pass(1);
    await settle();
    clock.pass(START_S * 1000);
    expect(kinds()).toEqual(['restarted not-started', 'failed not-started']);
  });
});

describe('a solver of another version', () => {
  it('is not talked to', async () => {
    const { shop, client, kinds } = setUp({ greeting: { type: 'ready', protocol: PROTOCOL_VERSION + 1 } });
    client.solve([plan], 1);
    await settle();
    expect(kinds()).toEqual(['failed other-version']);
    expect(shop.all[0].told).toEqual([]);
    expect(shop.all[0].killed).toBe(true);
  });
});

describe('closing', () => {
  it('ends the solver and says nothing more', async () => {
    const { clock, shop, client, events } = setUp();
    client.solve([plan], 1);
    await settle();
    client.close();
    shop.all[0].say(done(1));
    shop.all[0].die();
    expect(shop.all[0].killed).toBe(true);
    expect(clock.pending()).toBe(0);
    expect(events).toEqual([]);
  });

  it('ends a solver that comes up afterwards', async () => {
    const { shop, client } = setUp();
    client.solve([plan], 1);
    client.close();
    await settle();
    expect(shop.all[0].killed).toBe(true);
  });
});
