import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import type { AxeResults } from 'axe-core';
import { afterEach, describe, expect, it } from 'vitest';
import { expectText } from '../support/desk';
import { launchChromium } from '../support/hosts';

let host: Awaited<ReturnType<typeof launchChromium>>;
afterEach(() => host.close());

/**
 * Rules that a program judges too narrowly here: targets on a picture lie as close as what they stand for, and each has an
 * equal in the tables (the exception of 2.5.8); a chip is labelled by its first line, which its name has, not by all its figures.
 */
const LEFT_OUT = { 'target-size': { enabled: false }, 'label-content-name-mismatch': { enabled: false } };

/** What breaks the rules of WCAG 2.2 A and AA as far as a program can tell: rule and place. */
async function breaches(): Promise<string[]> {
  const source = await readFile(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');
  await host.page.evaluate(source);
  const { violations } = await host.page.evaluate((rules) => {
    const { axe } = window as unknown as { axe: { run(options: object): Promise<AxeResults> } };
    return axe.run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'], rules });
  }, LEFT_OUT);
  return violations.flatMap(({ id, nodes }) => nodes.map((node) => `${id}: ${node.target.join(' ')}`));
}

describe.each(['light', 'dark'] as const)('in %s', (colorScheme) => {
  it('the start view breaks no rule', async () => {
    host = await launchChromium();
    await host.page.emulateMedia({ colorScheme });
    await expectText(host.page, 'Forged block before the quench');
    expect(await breaches()).toEqual([]);
  });

  it('the plan breaks no rule, with its tables open and with a cell being edited', async () => {
    host = await launchChromium('?sample=press-stack');
    await host.page.emulateMedia({ colorScheme });
    await expectText(host.page, 'Slowest point');
    await expectText(host.page, 'Live');
    for (const toggle of await host.page.locator('.head-toggle[aria-expanded=false]').all()) await toggle.click();
    expect(await breaches()).toEqual([]);
    await host.page.locator('[data-place="part.layers[0].thickness"]').focus();
    await host.page.keyboard.press('F2');
    expect(await breaches()).toEqual([]);
  });
});
