/**
 * One plan from beginning to end, the same steps in a browser and in the window: open a sample, edit it by mouse and by keys,
 * see the answers change, play the timeline, undo and redo, save, open again, and find the same document.
 */
import type { Locator, Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';

/** What is done differently on each host. */
export interface Hands {
  readonly page: Page;
  readonly complaints: string[];
  /** Does what saves, and gives the text that was written. */
  saved(act: () => Promise<void>): Promise<string>;
  /** Does what opens, and chooses a file of this text. */
  open(text: string, act: () => Promise<void>): Promise<void>;
}

const SAMPLE = 'Forged block before the quench';
const THICKNESS = 'part.layers[0].thickness';
const LIMIT = 'requirements[0].must.limit';
const SET_POINT = 'Furnace in Up to 1020 °C';
/** Longer than the app waits before it solves after an edit, and before it says that it solves. */
const QUIET_MS = 450;
const SLOW = { timeout: 60_000 };

export function describePlan(hands: () => Hands): void {
  const page = (): Page => hands().page;
  const cell = (place: string): Locator => page().locator(`[data-place="${place}"]`);
  const setPoint = (): Locator => page().getByRole('slider', { name: SET_POINT });
  const setPointNow = async (): Promise<number> => Number(await setPoint().getAttribute('aria-valuenow'));
  const undoButton = (): Locator => page().getByRole('button', { name: /^Undo/ });

  /** The answers as they stand and as they are read out; null while they are not those of the plan on screen. */
  const readAnswers = (): Promise<string | null> =>
    page().evaluate(() => {
      const strip = document.querySelector('.answers-area');
      const chips = [...(strip?.querySelectorAll<HTMLElement>('.chip') ?? [])];
      if (strip === null || chips.length === 0 || strip.querySelector('.old, .wait') !== null) return null;
      if (document.querySelector('.live b')?.textContent !== 'Live') return null;
      const parts = [...strip.children].filter((part) => part.getAttribute('role') !== 'status') as HTMLElement[];
      return [...parts.map((part) => part.innerText), ...chips.map((chip) => chip.ariaLabel)].join('\n');
    });

  /** The answers once they have settled: a run that takes longer than QUIET_MS is announced by then, and reads as null. */
  async function answers(): Promise<string> {
    for (;;) {
      const read = await readAnswers();
      await page().waitForTimeout(QUIET_MS);
      if (read !== null && read === (await readAnswers())) return read;
    }
  }

  /** Does an edit and gives the answers that come after it, which must not be those from before. */
  async function answersAfter(edit: () => Promise<void>): Promise<string> {
    const before = await answers();
    await edit();
    await expect.poll(answers, SLOW).not.toBe(before);
    return await answers();
  }

  async function typeByKeys(place: string, text: string): Promise<void> {
    await cell(place).focus();
    await page().keyboard.type(text);
    await page().keyboard.press('Enter');
  }

  async function typeByMouse(place: string, text: string): Promise<void> {
    await cell(place).click();
    await cell(place).click();
    await cell(place).locator('input').fill(text);
    await page().keyboard.press('Enter');
  }

  describe('a plan from beginning to end', () => {
    let first: string;
    let edited: string;
    let document: string;

    it('opens from its card with all answers there', async () => {
      await page().getByRole('button', { name: SAMPLE }).click();
      first = await answers();
      expect(first).toContain('Slowest point');
      expect(first).toMatch(/Not met/);
    });

    it('answers anew when a thickness is typed, by keys and by mouse, in whatever unit', async () => {
      const thin = await answersAfter(() => typeByKeys(THICKNESS, '180'));
      expect(await cell(THICKNESS).innerText()).toMatch(/^180\s*mm$/);
      const thinner = await answersAfter(() => typeByMouse(THICKNESS, '6 in'));
      expect(await cell(THICKNESS).innerText()).toMatch(/^152\.4\s*mm$/);
      expect(new Set([first, thin, thinner]).size).toBe(3);
    });

    it('answers anew when a set-point is dragged, and when it is moved by keys', async () => {
      const before = await setPointNow();
      await answersAfter(async () => {
        const box = await setPoint().boundingBox();
        if (box === null) throw new Error('the set-point is not in sight');
        const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
        await page().mouse.move(x, y);
        await page().mouse.down();
        await page().mouse.move(x, y + 8, { steps: 4 });
        await page().mouse.up();
      });
      const dragged = await setPointNow();
      expect(dragged).toBeLessThan(before);
      await answersAfter(async () => {
        await setPoint().focus();
        for (let i = 0; i < 3; i++) await page().keyboard.press('ArrowUp');
        await page().keyboard.press('Enter');
      });
      expect(await setPointNow()).toBeGreaterThan(dragged);
    });

    it('answers anew when a limit is changed, by mouse and by keys', async () => {
      await answersAfter(() => typeByMouse(LIMIT, '900'));
      edited = await answersAfter(() => typeByKeys(LIMIT, '800 degC'));
      expect(await cell(LIMIT).innerText()).toContain('800');
    });

    it('refuses nonsense where it was typed, and keeps the plan', async () => {
      await cell(THICKNESS).focus();
      await page().keyboard.type('8 k');
      await page().keyboard.press('Enter');
      await expect.poll(() => page().locator('.pop.refused').innerText()).toContain('8 k');
      await page().keyboard.press('Escape');
      await expect.poll(() => cell(THICKNESS).innerText()).toMatch(/^152\.4\s*mm$/);
    });

    it('plays its timeline and stops', async () => {
      const now = (): Promise<string | null> =>
        page()
          .getByRole('slider', { name: /playhead/i })
          .getAttribute('aria-valuenow');
      const start = Number(await now());
      await page().getByRole('button', { name: 'Play', exact: true }).click();
      await expect.poll(async () => Number(await now())).toBeGreaterThan(start);
      await page().getByRole('button', { name: 'Pause' }).click();
      const paused = await now();
      await page().waitForTimeout(300);
      expect(await now()).toBe(paused);
    });

    it('undoes every edit by name, back to the sample, and redoes them', async () => {
      let undone = 0;
      for (; await undoButton().isEnabled(); undone++) {
        const name = await undoButton().getAttribute('aria-label');
        await page().keyboard.press('Control+z');
        await expect.poll(() => undoButton().getAttribute('aria-label')).not.toBe(name);
      }
      expect(undone).toBe(6);
      await expect.poll(answers, SLOW).toBe(first);
      for (let i = 0; i < undone; i++) await page().keyboard.press('Control+y');
      await expect.poll(answers, SLOW).toBe(edited);
    });

    it('saves, and says that it has', async () => {
      expect(await page().locator('.top-bar').innerText()).toContain('edited');
      document = await hands().saved(() => page().getByRole('button', { name: 'Save', exact: true }).click());
      const plan = JSON.parse(document);
      expect(plan.part.layers[0].thickness).toBeCloseTo(0.1524, 12);
      expect(plan.requirements[0].must.limit).toBe(800);
      expect(plan.cycle.stages[1].setPoint.segments[0].to).toBe(await setPointNow());
      await expect.poll(() => page().locator('.top-bar').innerText()).not.toContain('edited');
    });

    it('opens again as the same document with the same answers', async () => {
      await page().getByRole('button', { name: 'Start', exact: true }).click();
      await hands().open(document, () => page().keyboard.press('Control+o'));
      await expect.poll(answers, SLOW).toBe(edited);
      expect(await undoButton().isEnabled()).toBe(false);
      expect(await hands().saved(() => page().keyboard.press('Control+s'))).toBe(document);
    });

    it('went without a complaint from the page', () => {
      expect(hands().complaints).toEqual([]);
    });
  });
}
