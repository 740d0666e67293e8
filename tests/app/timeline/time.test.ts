import { effectScope, nextTick, ref } from 'vue';
import { describe, expect, it } from 'vitest';
import { eventNear, eventsOf, nextEvent, previousEvent } from '../../../app/timeline/events';
import { flagAt } from '../../../app/timeline/flag';
import { actionOf } from '../../../app/timeline/keys';
import { laneHeights, LANES, type LaneName } from '../../../app/timeline/lanes';
import { advance, speedChoices } from '../../../app/timeline/playback';
import { useClock } from '../../../app/timeline/useClock';
import { following, moved, zoomed } from '../../../app/timeline/window';
import { layCycle } from '../../../solver/model';
import { solve } from '../../../solver/planning';
import { lining } from '../support/lining';

const HOUR = 3600;
const laid = layCycle(lining());

describe('events', () => {
  const result = solve(lining());
  const events = eventsOf(laid, result);

  it('are the stage ends, and what the answers tell, in order of time', () => {
    expect(eventsOf(laid, null).map((event) => event.time / HOUR)).toEqual([0, 6, 8, 9]);
    const times = events.map((event) => event.time);
    expect(times).toEqual([...times].sort((a, b) => a - b));
    expect(events.find((event) => event.time === 6 * HOUR)?.label).toBe('end of Heat');
    expect(events.some(({ label }) => label.startsWith('Lining hot'))).toBe(true);
    const { hottest, largestDifference } = result.first;
    for (const first of [hottest, largestDifference]) expect(events.map(({ time }) => time)).toContain(first?.time_s);
  });

  it('never come twice at one time', () => {
    for (let i = 1; i < events.length; i++) expect(events[i].time - events[i - 1].time).toBeGreaterThan(laid.end * 1e-6);
  });

  it('are stepped through without standing still on one', () => {
    expect(nextEvent(events, 6 * HOUR)?.time).toBeGreaterThan(6 * HOUR);
    expect(previousEvent(events, 6 * HOUR)?.time).toBeLessThan(6 * HOUR);
    expect(nextEvent(events, laid.end)).toBeNull();
    expect(previousEvent(events, 0)).toBeNull();
  });

  it('draw the playhead only from within reach', () => {
    expect(eventNear(events, 6 * HOUR + 50, 100)?.label).toBe('end of Heat');
    expect(eventNear([{ time: 0, label: 'start' }], 200, 100)).toBeNull();
  });
});

describe('the window of the time axis', () => {
  it('zooms round a time that stays where it is', () => {
    const [from, to] = zoomed([0, 100], 0.5, 25, 100);
    expect((25 - from) / (to - from)).toBeCloseTo(0.25, 12);
    expect(to - from).toBe(50);
  });

  it('never leaves the cycle, nor shrinks to nothing', () => {
    expect(zoomed([0, 100], 3, 50, 100)).toEqual([0, 100]);
    const [from, to] = zoomed([99, 100], 1e-9, 100, 100);
    expect(to).toBeLessThanOrEqual(100);
    expect(to - from).toBeGreaterThan(0);
    expect(moved([60, 90], 500, 100)).toEqual([70, 100]);
    expect(moved([60, 90], -500, 100)).toEqual([0, 30]);
  });

  it('follows a playhead that leaves it, and lies still while it is inside', () => {
    const range: [number, number] = [20, 40];
    expect(following(range, 33, 100)).toBe(range);
    const [from, to] = following(range, 41, 100);
    expect(from).toBeLessThanOrEqual(41);
    expect(to).toBeGreaterThanOrEqual(41);
    expect(following(range, 5, 100)[0]).toBeLessThanOrEqual(5);
    expect(following([80, 100], 100, 100)).toEqual([80, 100]);
  });
});

describe('playing', () => {
  it('moves by the speed and stops at the end', () => {
    expect(advance(100, 500, 3600, 1e6)).toEqual({ time: 1900, ended: false });
    expect(advance(100, 500, 3600, 1000)).toEqual({ time: 1000, ended: true });
  });

  it('offers three speeds that suit the cycle, in times people say', () => {
    expect(speedChoices(60 * HOUR)).toEqual([600, HOUR, 6 * HOUR]);
    expect(speedChoices(90)).toHaveLength(3);
    for (const end of [5, 90, 3600, 1e6]) {
      const [slow, , fast] = speedChoices(end);
      expect(end / fast, `${end} s, fast`).toBeLessThan(25);
      expect(end / slow, `${end} s, slow`).toBeGreaterThan(60);
    }
  });
});

/** Frames that come when the test says so. */
function fakeWindow(reduced = false) {
  let asked: ((now: number) => void) | null = null;
  return {
    waiting: () => asked !== null,
    frame(now: number): void {
      const call = asked;
      asked = null;
      call?.(now);
    },
    requestAnimationFrame: (call: FrameRequestCallback): number => {
      asked = call;
      return 1;
    },
    cancelAnimationFrame: (): void => void (asked = null),
    matchMedia: () => ({ matches: reduced }) as MediaQueryList,
  };
}

describe('the clock', () => {
  const start = (at: number, reduced = false) => {
    const host = fakeWindow(reduced);
    const state = { time: ref(at), playing: ref(false), speed: ref(1000), end: ref(10_000) };
    const scope = effectScope();
    scope.run(() => useClock({ ...state, window: host }));
    return { host, scope, ...state };
  };

  it('asks for no frame until it plays, and for none after the end', async () => {
    const { host, time, playing } = start(9_900);
    expect(host.waiting()).toBe(false);
    playing.value = true;
    await nextTick();
    [0, 16, 200].forEach((now) => host.frame(now));
    expect(time.value).toBe(10_000);
    expect(playing.value).toBe(false);
    expect(host.waiting()).toBe(false);
  });

  it('moves by real time, but not over the time that the window was hidden', async () => {
    const { host, time, playing } = start(0);
    playing.value = true;
    await nextTick();
    [1000, 1016].forEach((now) => host.frame(now));
    expect(time.value).toBeCloseTo(16, 9);
    host.frame(61_016);
    expect(time.value).toBeLessThanOrEqual(16 + 250);
  });

  it('starts over when played from the end, and stops at once when paused or gone', async () => {
    const { host, time, playing, scope } = start(10_000);
    playing.value = true;
    await nextTick();
    expect(time.value).toBe(0);
    playing.value = false;
    await nextTick();
    expect(host.waiting()).toBe(false);
    playing.value = true;
    await nextTick();
    scope.stop();
    expect(host.waiting()).toBe(false);
  });

  it('goes in steps where less motion is wanted', async () => {
    const { host, time, playing } = start(0, true);
    playing.value = true;
    await nextTick();
    const seen = new Set<number>();
    for (let now = 0; now <= 1600; now += 16) {
      host.frame(now);
      seen.add(time.value);
    }
    expect([...seen]).toEqual([0, 500, 1000, 1500]);
  });
});

describe('keys of the timeline', () => {
  const press = (key: string, more: Partial<KeyboardEvent> = {}) =>
    actionOf({ key, shiftKey: false, ctrlKey: false, altKey: false, metaKey: false, ...more });

  it('play, step, jump and zoom', () => {
    expect([' ', 'ArrowLeft', 'ArrowRight', 'Home', 'End', '+', '-', '0'].map((key) => press(key))).toEqual([
      'play',
      'frameBack',
      'frameOn',
      'start',
      'end',
      'zoomIn',
      'zoomOut',
      'whole',
    ]);
    expect(press('ArrowRight', { shiftKey: true })).toBe('eventOn');
    expect(press('ArrowLeft', { shiftKey: true })).toBe('eventBack');
  });

  it('leave those with Ctrl, Alt or Meta to others', () => {
    expect(press('0', { ctrlKey: true })).toBeNull();
    expect(press('ArrowLeft', { altKey: true })).toBeNull();
    expect(press('q')).toBeNull();
  });
});

describe('heights of lanes', () => {
  const needs = { series: 4, closed: new Set<LaneName>(), requirements: 500 };

  it('fill the room, whatever it is', () => {
    for (let room = 160; room < 900; room += 13) expect(laneHeights(room, needs).total).toBeGreaterThanOrEqual(room);
    expect(laneHeights(400, needs).total).toBe(400);
  });

  it('give the temperatures more when there are many', () => {
    expect(laneHeights(400, { ...needs, series: 6 }).temperature).toBeGreaterThan(laneHeights(400, needs).temperature);
  });

  it('give what a closed or short lane leaves to the temperatures', () => {
    const closed = laneHeights(400, { ...needs, closed: new Set<LaneName>(['cycle']) });
    expect(closed.cycle).toBe(20);
    expect(closed.total).toBe(400);
    expect(laneHeights(400, { ...needs, requirements: 40 }).requirements).toBe(40);
    expect(LANES.every((lane) => laneHeights(60, needs)[lane] >= 20)).toBe(true);
  });
});

describe('the flag', () => {
  it('stays in sight at both ends of the axis', () => {
    const { middle, half } = flagAt(0, 1000, '38 h 40 min', 'end of Heat');
    expect(middle - half).toBeGreaterThanOrEqual(-40);
    const right = flagAt(1000, 1000, '38 h 40 min', 'end of Heat');
    expect(right.middle + right.half).toBeLessThanOrEqual(1024);
    expect(flagAt(500, 1000, '38 h 40 min', null).middle).toBe(500);
  });
});
