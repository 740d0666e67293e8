/** What tests do to a plan on the desk, the same on both hosts. */
import { readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import type { Page } from 'playwright-core';
import { expect } from 'vitest';
import type { Project } from '../../../solver/model';

const folder = resolve(import.meta.dirname, '../../../samples');

/** The text of a sample, changed. */
export function sampleText(id: string, change: (plan: Project) => void = () => undefined): string {
  const plan = JSON.parse(readFileSync(join(folder, `${id}.soak`), 'utf8')) as Project;
  change(plan);
  return `${JSON.stringify(plan, null, 2)}\n`;
}

/** Gives the plan another title: an edit that needs no solver. */
export async function retitle(page: Page, title: string): Promise<void> {
  await page.getByTitle('Change the title').click();
  await page.getByLabel('Title of the plan').fill(title);
  await page.keyboard.press('Enter');
  await expectText(page, title);
}

/** Waits until the page shows a text. */
export async function expectText(page: Page, text: string): Promise<void> {
  const shows = (): Promise<boolean> => page.evaluate((text) => document.body.innerText.includes(text), text);
  await expect.poll(shows, { timeout: 60_000, message: `the page shows “${text}”` }).toBe(true);
}

/** The journal is written a little after an edit, so that typing is not slowed down. */
export const journalWritten = (page: Page): Promise<void> => page.waitForTimeout(2500);
