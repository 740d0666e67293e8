import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { tryForbidden } from '../support/forbidden';
import { launchChromium } from '../support/hosts';

let host: Awaited<ReturnType<typeof launchChromium>>;
beforeAll(async () => {
  host = await launchChromium();
});
afterAll(() => host.close());

describe('the page in a browser', () => {
  it('shows the app without a complaint', async () => {
    await host.page.waitForSelector('#app > *');
    expect(await host.page.title()).toContain('Soakwright');
    expect(host.complaints).toEqual([]);
  });

  it('asks nobody but its own server for anything', async () => {
    const asked: string[] = [];
    host.page.on('request', (request) => asked.push(request.url()));
    await host.page.reload();
    await host.page.waitForSelector('#app > *');
    expect(asked.length).toBeGreaterThan(1);
    for (const url of asked) expect(url).toMatch(new RegExp(`^(${host.url}|blob:${host.url}|data:)`));
  });

  it('may neither evaluate text nor reach other origins', async () => {
    expect(await tryForbidden(host.page)).toEqual(['connect-src', 'script-src']);
  });
});
