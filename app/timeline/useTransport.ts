/** What the transport, the keys and the pointer do: the playhead goes somewhere, or the window shows another part. */
import type { Ref } from 'vue';
import type { LaidCycle } from '../../solver/model';
import { clamp, indexAt, type Scale } from '../draw';
import { useRunStore, useViewStore } from '../stores';
import { eventNear, nextEvent, previousEvent, type TimeEvent } from './events';
import { actionOf, type TimelineAction } from './keys';
import { moved, zoomed } from './window';

export interface TransportOptions {
  laid: Readonly<Ref<LaidCycle | null>>;
  /** End of the cycle, s. */
  end: Readonly<Ref<number>>;
  events: Readonly<Ref<readonly TimeEvent[]>>;
  /** The time axis, to pixels of the plot. */
  time: Readonly<Ref<Scale>>;
  /** The element that holds the lanes, and how far into it the plot begins, px. */
  body: Readonly<Ref<HTMLElement | null>>;
  gutter: Readonly<Ref<number>>;
}

export interface TransportActions {
  act(action: TimelineAction): void;
  go(time: number): void;
  /** Shows the whole cycle or the stage that is looked at, as the view says. */
  showWindow(): void;
  onKey(event: KeyboardEvent): void;
  /** Drags the playhead, from wherever it was pressed. */
  scrub(event: PointerEvent): void;
  /** Pressed beside everything that takes the pointer for itself. */
  onDown(event: PointerEvent): void;
  onWheel(event: WheelEvent): void;
}

/** How far the playhead jumps to an event, px. */
const SNAP = 6;
const ZOOM = 1.6;
/** Wheel pixels that zoom by a factor of e. */
const WHEEL = 300;
/** Frames of a cycle that has not been solved. */
const FRAMES = 600;

export function useTransport({ laid, end, events, time, body, gutter }: TransportOptions): TransportActions {
  const run = useRunStore();
  const view = useViewStore();

  function go(to: number): void {
    view.playing = false;
    view.time = clamp(to, 0, end.value);
  }

  /** One stored frame back or on. */
  function frame(by: 1 | -1): void {
    const times = run.frames?.time_s ?? Float64Array.from({ length: FRAMES + 1 }, (_, i) => (end.value * i) / FRAMES);
    const at = indexAt(times, view.time);
    const next = by > 0 ? at + 1 : times[at] < view.time ? at : at - 1;
    go(times[clamp(next, 0, times.length - 1)] ?? view.time);
  }

  function showWindow(): void {
    const stages = laid.value?.stages ?? [];
    const stage =
      stages.find(({ id }) => id === view.selectedStage) ?? stages.find((item) => view.time < item.end) ?? stages.at(-1);
    if (view.show === 'cycle') view.range = [0, end.value];
    else if (stage !== undefined && stage.end > stage.start) view.range = [stage.start, stage.end];
  }

  function act(action: TimelineAction): void {
    switch (action) {
      case 'play':
        view.playing = !view.playing;
        return;
      case 'frameBack':
        return frame(-1);
      case 'frameOn':
        return frame(1);
      case 'eventBack':
        return go(previousEvent(events.value, view.time)?.time ?? 0);
      case 'eventOn':
        return go(nextEvent(events.value, view.time)?.time ?? end.value);
      case 'start':
        return go(0);
      case 'end':
        return go(end.value);
      case 'zoomIn':
      case 'zoomOut':
        view.range = zoomed(view.range, action === 'zoomIn' ? 1 / ZOOM : ZOOM, view.time, end.value);
        return;
      case 'whole':
      case 'stage':
        view.show = action === 'whole' ? 'cycle' : 'stage';
        showWindow();
    }
  }

  /** Keys that a focused control needs for itself stay with it. */
  function onKey(event: KeyboardEvent): void {
    const target = event.target as HTMLElement;
    if (event.defaultPrevented || target.closest('input, select, textarea, [role="radiogroup"]') !== null) return;
    if (event.key === ' ' && target.closest('button') !== null) return;
    const action = actionOf(event);
    if (action === null) return;
    event.preventDefault();
    act(action);
  }

  const pixelOf = (clientX: number): number => clientX - (body.value?.getBoundingClientRect().left ?? 0) - gutter.value;
  const perPixel = (): number => (time.value.to - time.value.from) / time.value.end;

  function scrub(event: PointerEvent): void {
    const host = body.value;
    if (event.button !== 0 || host === null) return;
    host.setPointerCapture(event.pointerId);
    const move = (at: PointerEvent): void => {
      const wanted = time.value.valueAt(pixelOf(at.clientX));
      const near = view.snap ? eventNear(events.value, wanted, SNAP * perPixel()) : null;
      go(near?.time ?? clamp(wanted, time.value.from, time.value.to));
    };
    const stop = (): void => {
      host.removeEventListener('pointermove', move);
      for (const end of ['pointerup', 'pointercancel'] as const) host.removeEventListener(end, stop);
    };
    host.addEventListener('pointermove', move);
    for (const end of ['pointerup', 'pointercancel'] as const) host.addEventListener(end, stop);
    move(event);
  }

  function onDown(event: PointerEvent): void {
    const x = pixelOf(event.clientX);
    if (x >= 0 && x <= time.value.end) scrub(event);
  }

  /** Ctrl zooms at the pointer; Shift, or a sideways wheel, moves the window. */
  function onWheel(event: WheelEvent): void {
    const sideways = event.shiftKey ? event.deltaY || event.deltaX : event.deltaX;
    if (!event.ctrlKey && sideways === 0) return;
    event.preventDefault();
    view.range = event.ctrlKey
      ? zoomed(view.range, Math.exp(event.deltaY / WHEEL), time.value.valueAt(pixelOf(event.clientX)), end.value)
      : moved(view.range, sideways * perPixel(), end.value);
  }

  return { act, go, showWindow, onKey, scrub, onDown, onWheel };
}
