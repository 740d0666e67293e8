/**
 * The app in real Chromium and in the test runtime's Electron: from a keystroke to the new answer, the work of a playing
 * frame, and the start. Run on a quiet machine; there may be no GPU, so the rate of frames is told and not judged.
 */
import { existsSync } from 'node:fs';
import { join, resolve } from 'node:path';
import type { Page } from 'playwright-core';
import { prepareRuntime } from '../end-to-end/electron-runtime/prepare';
import { launchChromium, launchUnattended } from '../end-to-end/support/hosts';
import { findChromium, findScreen } from '../end-to-end/support/machine';
import { quantile, report } from './figures';
import { frameWork, traced } from './trace';

/** The sample with the most layers. */
const LARGEST = 'press-stack';
const THICKNESS = '[data-place="part.layers[0].thickness"]';
const KEYSTROKES = 20;
const STARTS = 5;
const PLAY_MS = 6000;

interface Bench {
  host: string;
  page: Page;
  /** From launching to a plan that can be edited, and to its answers, ms. */
  usable: number;
  answered: number;
  close(): Promise<void>;
}

export async function benchApp(): Promise<void> {
  const root = resolve(import.meta.dirname, '../..');
  if (!existsSync(join(root, 'out/app/index.html'))) throw new Error('The app is not built: npm run build');
  const hosts: (() => Promise<Bench>)[] = [];
  if (findChromium() === null) console.error('Chromium is not on this machine: not measured there.');
  else hosts.push(startChromium);
  const runtime = findScreen() === null ? null : await prepareRuntime();
  if (runtime?.kind === 'ready') hosts.push(startElectron);
  else console.error('There is no screen or no test runtime of Electron: not measured there.');
  for (const start of hosts) await benchHost(start);
}

async function benchHost(start: () => Promise<Bench>): Promise<void> {
  const starts: Bench[] = [];
  for (let i = 0; i < STARTS; i++) {
    const bench = await start();
    starts.push(bench);
    if (i < STARTS - 1) await bench.close();
  }
  const { host, page, close } = starts[STARTS - 1];
  const figure = (bench: string, limit: number) => ({ bench, host, unit: 'ms' as const, limit });
  report(
    figure('start to a plan that can be edited', 3000),
    starts.map(({ usable }) => usable),
  );
  report(
    figure('start to the answers of the first plan', 3000),
    starts.map(({ answered }) => answered),
  );
  report(figure(`keystroke in a thickness of ${LARGEST} to new answers`, 250), await keystrokes(page));
  const { clock, processor, perSecond } = frameWork(await traced(page, () => play(page)));
  const onProcessor = { processorP95: Math.round(quantile(processor, 0.95) * 10) / 10 };
  report(figure('script, layout and paint of a playing frame', 8), clock, {
    ...onProcessor,
    framesPerSecond: Math.round(perSecond),
  });
  await close();
}

/** A browser is there already when the app is opened in it: its own start is not counted. */
async function startChromium(): Promise<Bench> {
  const launched = await launchChromium('', { blank: true });
  const { page, context, url, close } = launched;
  const began = Date.now();
  const [usable, answered] = await opened(page, began, () => page.goto(`${url}?sample=${LARGEST}`));
  return { host: `Chromium ${context.browser()?.version()}`, page, usable, answered, close };
}

async function startElectron(): Promise<Bench> {
  const launched = await launchUnattended([`--sample=${LARGEST}`]);
  const { page, detach } = await launched.attach();
  const [usable, answered] = await opened(page, launched.began);
  const version = await page.evaluate(() => /Chrome\/(\d+)/.exec(navigator.userAgent)?.[1]);
  return {
    host: `Electron (Chromium ${version})`,
    page,
    usable,
    answered,
    async close() {
      await detach();
      await launched.close();
    },
  };
}

/** Waits for the plan and for its answers; the clock is read in the page, frame by frame. */
async function opened(
  page: Page,
  began: number,
  open: () => Promise<unknown> = async () => undefined,
): Promise<[number, number]> {
  await open();
  const shown = async (selector: string): Promise<number> => {
    const now = (wanted: string): number | false => document.querySelector(wanted) !== null && Date.now();
    return Number(await (await page.waitForFunction(now, selector, { polling: 'raf' })).jsonValue());
  };
  return [(await shown(THICKNESS)) - began, (await shown('.chip.met, .chip.not')) - began];
}

/** From the key's own time stamp to the frame after the one in which other answers stand. */
async function keystrokes(page: Page): Promise<number[]> {
  const times: number[] = [];
  await settle(page);
  for (let i = 0; i < KEYSTROKES; i++) {
    await page.locator(THICKNESS).focus();
    await page.evaluate(watchAnswers);
    await page.keyboard.press(String(3 + (i % 7))); // it is 2 mm thick in the sample
    times.push(await page.evaluate(() => (window as unknown as { answered: Promise<number> }).answered));
    await page.keyboard.press('Escape');
    await settle(page);
  }
  return times;
}

/** Runs in the page: makes `window.answered` the time from the next key to the new answers. */
function watchAnswers(): void {
  let struck = 0;
  const strip = document.querySelector('.answers-area') as HTMLElement;
  const before = strip.textContent;
  addEventListener('keydown', (event) => (struck = event.timeStamp), { capture: true, once: true });
  const answered = new Promise<number>((done) => {
    const watcher = new MutationObserver(() => {
      if (struck === 0 || strip.textContent === before || strip.querySelector('.old, .wait') !== null) return;
      watcher.disconnect();
      requestAnimationFrame(() => setTimeout(() => done(performance.now() - struck)));
    });
    watcher.observe(strip, { subtree: true, childList: true, characterData: true, attributes: true });
  });
  Object.assign(window, { answered });
}

/** Long enough for the answers of the plan to be there again. */
const settle = (page: Page): Promise<void> => page.waitForTimeout(1200);

/** At the slowest speed, so that it does not come to the end. */
async function play(page: Page): Promise<void> {
  await page
    .getByRole('radiogroup', { name: /^Speed/ })
    .getByRole('radio')
    .first()
    .click();
  await page.getByRole('button', { name: 'To the start' }).click();
  await page.getByRole('button', { name: 'Play', exact: true }).click();
  await page.waitForTimeout(PLAY_MS);
  await page.getByRole('button', { name: 'Pause' }).click();
}
