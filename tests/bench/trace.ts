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
  args?: { name?: string; data?: { isMainFrame?: boolean } };
}

const CATEGORIES = 'devtools.timeline,disabled-by-default-devtools.timeline,__metadata';
/** Script, style, layout and paint on the page's main thread; what lies inside another is counted with it. */
const WORK = new Set([
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
  'Commit',
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

/** The work of each frame that the page's main thread made, ms, and the frames a second. */
export function frameWork(events: readonly TraceEvent[]): { works: number[]; perSecond: number } {
  const { pid, tid } = busiestRenderer(events);
  const own = events.filter((event) => event.pid === pid && event.tid === tid).sort((a, b) => a.ts - b.ts);
  const frames = own.filter(({ name }) => name === 'BeginMainThreadFrame').map(({ ts }) => ts);
  const works = new Array<number>(Math.max(0, frames.length - 1)).fill(0);
  let frame = 0;
  let done = 0;
  for (const { name, ph, ts, dur = 0 } of own) {
    if (ph !== 'X' || !WORK.has(name) || ts < done) continue;
    done = ts + dur;
    while (frame < frames.length - 1 && ts >= frames[frame + 1]) frame++;
    if (ts >= frames[0] && frame < works.length) works[frame] += dur / 1000;
  }
  const seconds = (frames[frames.length - 1] - frames[0]) / 1e6;
  return { works, perSecond: works.length / seconds };
}

/** The page's main thread: of all renderers the one that made most frames. */
function busiestRenderer(events: readonly TraceEvent[]): { pid: number; tid: number } {
  const counts = new Map<string, number>();
  for (const { name, pid, tid } of events) {
    if (name === 'BeginMainThreadFrame') counts.set(`${pid} ${tid}`, (counts.get(`${pid} ${tid}`) ?? 0) + 1);
  }
  const [most] = [...counts].sort((a, b) => b[1] - a[1]);
  if (most === undefined) throw new Error('the trace has no frame');
  const [pid, tid] = most[0].split(' ').map(Number);
  return { pid, tid };
}
