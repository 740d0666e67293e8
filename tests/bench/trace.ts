/** The work of frames, read from a trace of the browser. */
import type { Browser, Page } from 'playwright-core';

export interface TraceEvent {
  name: string;
  ph: string;
  pid: number;
  tid: number;
  /** Start and length, µs. */
  ts: number;
  dur?: number;
  /** Length on the processor, µs: without the time that other processes took. */
  tdur?: number;
  args?: { name?: string; data?: { isMainFrame?: boolean } };
}

const CATEGORIES = 'devtools.timeline,disabled-by-default-devtools.timeline,__metadata';
/** Handing the frame over to the compositor: the last thing that the main thread does for it. */
const END_OF_FRAME = 'Commit';
/** Script, style, layout and paint on the page's main thread; what lies inside another is counted with it. */
const WORK = new Set([
  END_OF_FRAME,
  'FireAnimationFrame',
  'FunctionCall',
  'EvaluateScript',
  'TimerFire',
  'RunMicrotasks',
  'EventDispatch',
  'UpdateLayoutTree',
  'Layout',
  'PrePaint',
  'Paint',
  'Layerize',
  'UpdateLayerTree',
  'IntersectionObserverController::computeIntersections',
  'HitTest',
]);

/** Does something and gives the trace of it. */
export async function traced(page: Page, act: () => Promise<void>): Promise<TraceEvent[]> {
  const session = await (page.context().browser() as Browser).newBrowserCDPSession();
  const events: TraceEvent[] = [];
  session.on('Tracing.dataCollected', ({ value }) => events.push(...(value as unknown as TraceEvent[])));
  await session.send('Tracing.start', { categories: CATEGORIES, transferMode: 'ReportEvents' });
  await act();
  const complete = new Promise((done) => session.once('Tracing.tracingComplete', done));
  await session.send('Tracing.end');
  await complete;
  await session.detach();
  return events;
}

export interface FrameWork {
  /** Work of each frame, ms on the clock and ms on the processor. */
  clock: number[];
  processor: number[];
  perSecond: number;
}

/** The work of each frame that the page's main thread made. */
export function frameWork(events: readonly TraceEvent[]): FrameWork {
  const { pid, tid } = busiestRenderer(events);
  const own = events.filter((event) => event.pid === pid && event.tid === tid && event.ph === 'X' && WORK.has(event.name));
  own.sort((a, b) => a.ts - b.ts || (b.dur ?? 0) - (a.dur ?? 0));
  const clock: number[] = [];
  const processor: number[] = [];
  const ends: number[] = [];
  let [onClock, onProcessor, done] = [0, 0, 0];
  for (const { name, ts, dur = 0, tdur = dur } of own) {
    if (ts < done) continue;
    done = ts + dur;
    onClock += dur / 1000;
    onProcessor += tdur / 1000;
    if (name !== END_OF_FRAME) continue;
    clock.push(onClock);
    processor.push(onProcessor);
    ends.push(done);
    [onClock, onProcessor] = [0, 0];
  }
  const seconds = (ends[ends.length - 1] - ends[0]) / 1e6;
  return { clock, processor, perSecond: (ends.length - 1) / seconds };
}

/** The page's main thread: of all renderers the one that made most frames. */
function busiestRenderer(events: readonly TraceEvent[]): { pid: number; tid: number } {
  const counts = new Map<string, number>();
  for (const { name, pid, tid } of events) {
    if (name === END_OF_FRAME) counts.set(`${pid} ${tid}`, (counts.get(`${pid} ${tid}`) ?? 0) + 1);
  }
  const [most] = [...counts].sort((a, b) => b[1] - a[1]);
  if (most === undefined) throw new Error('the trace has no frame');
  const [pid, tid] = most[0].split(' ').map(Number);
  return { pid, tid };
}
