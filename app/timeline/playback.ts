/** Playing: how time moves on, and at which speeds. */

/** Cycle seconds a second: round times that people say. */
const SPEEDS = [
  0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5, 10, 30, 60, 120, 300, 600, 1800, 3600, 7200, 21600, 43200, 86400, 172800, 604800,
];
/** How long the whole cycle takes at the slow, the middle and the fast speed, s. */
const WHOLE_CYCLE = [300, 60, 10];

/** Three speeds that suit a cycle of this length (s), slow to fast. */
export function speedChoices(end: number): number[] {
  const choices = WHOLE_CYCLE.map((seconds) => {
    const wanted = end / seconds;
    return SPEEDS.reduce((a, b) => (Math.abs(Math.log(b / wanted)) < Math.abs(Math.log(a / wanted)) ? b : a));
  });
  return [...new Set(choices)];
}

/** Where the playhead is after some real time (ms), and whether it has come to the end. */
export function advance(time: number, elapsedMs: number, speed: number, end: number): { time: number; ended: boolean } {
  const next = time + (elapsedMs / 1000) * speed;
  return next >= end ? { time: end, ended: true } : { time: next, ended: false };
}
