/** The pieces of a requirement's bar on the time axis. */
import type { Requirement, Span } from '../model';
import type { Tally } from './tally';

/** Spans of a requirement watched up to `reached`, s: first the window it counts in, then what happened. */
export function spansOf({ must, counts }: Requirement, tally: Tally, reached: number): Span[] {
  const { window, holds } = tally;
  const spans: Span[] = [span(window.counts.from, window.counts.to, 'counting')];
  const add = (from: number, to: number, kind: Span['kind']): void => {
    if (to > from) spans.push(span(from, to, kind));
  };
  if (must.kind === 'heldFor') {
    const end = counts.kind === 'stageEnd' ? window.counts.to : null;
    for (const { begin, to } of holds) {
      // Before a stage's end only the hold that leads up to it can fulfil anything.
      const enough = end !== null && to < end ? to : Math.min(to, begin.time + must.duration);
      add(begin.time, enough, 'holding');
      add(enough, to, 'fulfilled');
    }
    return spans;
  }
  if (counts.kind === 'stageEnd') {
    const { from } = window.counts;
    if (tally.worst !== null) spans.push(span(from, from, tally.margin(tally.worst.value) >= 0 ? 'fulfilled' : 'violated'));
    return spans;
  }
  let heldTo = window.counts.from;
  for (const { begin, to } of holds) {
    if (must.kind !== 'reaches') add(heldTo, begin.time, 'violated');
    add(begin.time, Math.min(to, window.counts.to), 'fulfilled');
    add(Math.max(begin.time, window.counts.to), to, 'holding');
    heldTo = to;
  }
  if (must.kind !== 'reaches') add(heldTo, Math.min(window.counts.to, reached), 'violated');
  return spans;
}

const span = (from_s: number, to_s: number, kind: Span['kind']): Span => ({ from_s, to_s, kind });
