/** The one animation clock: moves the playhead while playing, and stops when nothing moves. */
import { onScopeDispose, watch, type Ref } from 'vue';
import { advance } from './playback';

export interface ClockOptions {
  /** Playhead, s. */
  time: Ref<number>;
  playing: Ref<boolean>;
  /** Cycle seconds a second. */
  speed: Ref<number>;
  /** End of the cycle, s. */
  end: Ref<number>;
  /** Where frames and the wish for less motion come from. */
  window?: Pick<Window, 'requestAnimationFrame' | 'cancelAnimationFrame' | 'matchMedia'>;
}

/** With reduced motion the picture changes in steps instead of gliding: this far apart, ms. */
const STEP_MS = 500;
/** A window that was hidden does not make up for the time it lost, ms. */
const LONGEST_MS = 250;

/** Runs as long as `playing` holds; ends by itself at the end of the cycle, and starts over when played from there. */
export function useClock({ time, playing, speed, end, window: host = window }: ClockOptions): void {
  let frame: number | null = null;
  let last = 0;
  let saved = 0;
  let still = false;

  function tick(now: number): void {
    const elapsed = still ? now - last : Math.min(now - last, LONGEST_MS);
    last = now;
    saved += elapsed;
    if (still && saved < STEP_MS) {
      frame = host.requestAnimationFrame(tick);
      return;
    }
    const next = advance(time.value, still ? STEP_MS : saved, speed.value, end.value);
    saved = 0;
    time.value = next.time;
    if (next.ended) playing.value = false;
    else frame = host.requestAnimationFrame(tick);
  }

  function start(): void {
    if (frame !== null) return;
    if (time.value >= end.value) time.value = 0;
    still = host.matchMedia('(prefers-reduced-motion: reduce)').matches;
    saved = 0;
    frame = host.requestAnimationFrame((now) => {
      last = now;
      frame = host.requestAnimationFrame(tick);
    });
  }

  function stop(): void {
    if (frame !== null) host.cancelAnimationFrame(frame);
    frame = null;
  }

  watch(playing, (plays) => (plays ? start() : stop()), { immediate: true });
  onScopeDispose(stop);
}
