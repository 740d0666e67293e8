import { mkdir, mkdtemp, rm, symlink, writeFile } from 'node:fs/promises';
import { request } from 'node:http';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { LOOPBACK, serveApp, type AppServer } from '../../../main/browser/server';
import { PAGE_POLICY } from '../../../main/policy';

let folder: string;
let server: AppServer;
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'soakwright-served-'));
  const app = join(folder, 'app');
  await mkdir(join(app, 'solver'), { recursive: true });
  await mkdir(join(app, 'assets'));
  await writeFile(join(app, 'index.html'), '<!doctype html>page');
  await writeFile(join(app, 'solver/worker-1.js'), 'worker');
  await writeFile(join(app, 'assets/.hidden'), 'hidden');
  await writeFile(join(folder, 'secret.txt'), 'secret');
  server = await serveApp(app, 0);
});
afterAll(async () => {
  await server.close();
  await rm(folder, { recursive: true });
});

interface Got {
  status: number;
  headers: Record<string, string | string[] | undefined>;
  body: string;
}
/** A request as it is written here: nothing tidies the path or the host. */
function get(path: string, options: { method?: string; host?: string } = {}): Promise<Got> {
  const { port } = new URL(server.url);
  return new Promise((resolve, reject) => {
    const headers = { host: options.host ?? `${LOOPBACK}:${port}` };
    const sent = request({ host: LOOPBACK, port, path, method: options.method ?? 'GET', headers }, (response) => {
      let body = '';
      response.on('data', (chunk) => (body += chunk));
      response.on('end', () => resolve({ status: response.statusCode ?? 0, headers: response.headers, body }));
    });
    sent.on('error', reject);
    sent.end();
  });
}

describe('the server of the app', () => {
  it('listens on the loopback address and nowhere else', () => {
    expect(server.url).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/$/);
  });

  it('gives the page with the strict policy, at "/" and with a query', async () => {
    for (const path of ['/', '/index.html', '/?sample=forged-block']) {
      const got = await get(path);
      expect(got).toMatchObject({ status: 200, body: '<!doctype html>page' });
      expect(got.headers['content-security-policy']).toBe(`${PAGE_POLICY}; frame-ancestors 'none'`);
      expect(got.headers['content-type']).toBe('text/html; charset=utf-8');
      expect(got.headers['x-content-type-options']).toBe('nosniff');
    }
  });

  it('allows neither inline code nor eval nor other origins', () => {
    expect(PAGE_POLICY).toContain("default-src 'none'");
    expect(PAGE_POLICY).not.toMatch(/unsafe|https?:|\*/);
  });

  it('gives the worker a policy of its own', async () => {
    const got = await get('/solver/worker-1.js');
    expect(got.headers['content-security-policy']).toBe("default-src 'none'; script-src 'self'");
    expect(got.headers['content-type']).toBe('text/javascript; charset=utf-8');
  });

  it.each([
    '/../secret.txt',
    '/assets/../../secret.txt',
    '/%2e%2e/secret.txt',
    '/..%2fsecret.txt',
    '/assets/..%5c..%5csecret.txt',
    '/assets/%00',
    '/%',
    '//etc/passwd',
    '/assets',
    '/assets/',
    '/assets/.hidden',
    '/nothing.js',
  ])('gives nothing for %s', async (path) => {
    expect(await get(path)).toMatchObject({ status: 404, body: 'There is no such file.\n' });
  });

  it('answers HEAD without a body, and no request that would change something', async () => {
    expect(await get('/', { method: 'HEAD' })).toMatchObject({ status: 200, body: '' });
    for (const method of ['POST', 'PUT', 'DELETE', 'OPTIONS']) expect((await get('/', { method })).status).toBe(405);
  });

  it('refuses a name that was bent to this machine', async () => {
    expect((await get('/', { host: 'plans.example' })).status).toBe(421);
    expect((await get('/', { host: '127.0.0.1' })).status).toBe(421);
    expect((await get('/', { host: `localhost:${new URL(server.url).port}` })).status).toBe(200);
  });

  it('takes another port when the usual one is taken', async () => {
    const holder = createServer().listen(0, LOOPBACK);
    await new Promise((listening) => holder.once('listening', listening));
    const { port } = holder.address() as { port: number };
    const other = await serveApp(join(folder, 'app'), port);
    expect(Number(new URL(other.url).port)).not.toBe(port);
    await other.close();
    holder.close();
  });

  it('follows no link out of its folder', async () => {
    await symlink(join(folder, 'secret.txt'), join(folder, 'app/assets/link.txt'));
    expect((await get('/assets/link.txt')).status).toBe(404);
  });
});
