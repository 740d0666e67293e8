/**
 * The built app for a browser on this machine: its files, read only, with the headers that keep the page in its bounds.
 *
 * Listens on the loopback address alone. A request that names another host was sent here by a page of somebody else's
 * through a name of theirs; it is refused.
 */
import { createServer, type IncomingMessage, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { readAppFile } from '../appFiles';
import { headersFor } from '../policy';

export interface AppServer {
  /** "http://127.0.0.1:PORT/" */
  readonly url: string;
  close(): Promise<void>;
}

export const LOOPBACK = '127.0.0.1';
/**
 * Always the same, if it is free: the journal and the preferences belong to the origin, and that has the port in it.
 */
export const USUAL_PORT = 47321;

/** Serves `folder`. `port` 0 takes any; another one that is taken gives way to any. */
export async function serveApp(folder: string, port: number = USUAL_PORT): Promise<AppServer> {
  const server = createServer((request, response) => {
    void answer(folder, request, hostsOf(server)).then(({ status, headers, body }) => {
      response.writeHead(status, { ...headers, 'Cache-Control': 'no-cache', 'Content-Length': body.length });
      response.end(request.method === 'HEAD' ? undefined : body);
    });
  });
  await listen(server, port).catch(async (error: NodeJS.ErrnoException) => {
    if (error.code !== 'EADDRINUSE' && error.code !== 'EACCES') throw error;
    await listen(server, 0);
  });
  return {
    url: `http://${LOOPBACK}:${portOf(server)}/`,
    close: () =>
      new Promise((done) => {
        server.close(() => done());
        server.closeAllConnections();
      }),
  };
}

const portOf = (server: Server): number => (server.address() as AddressInfo).port;
const hostsOf = (server: Server): string[] => [LOOPBACK, 'localhost'].map((name) => `${name}:${portOf(server)}`);

function listen(server: Server, port: number): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, LOOPBACK, () => {
      server.off('error', reject);
      resolve();
    });
  });
}

interface Reply {
  status: number;
  headers: Record<string, string>;
  body: Buffer;
}

const refuse = (status: number, reason: string): Reply => ({
  status,
  headers: headersFor('reply.txt'),
  body: Buffer.from(`${reason}\n`),
});

async function answer(folder: string, request: IncomingMessage, hosts: string[]): Promise<Reply> {
  if (!hosts.includes(request.headers.host ?? '')) return refuse(421, 'This server answers only under its own address.');
  if (request.method !== 'GET' && request.method !== 'HEAD') return refuse(405, 'This server only hands out files.');
  const pathname = (request.url ?? '').replace(/[?#].*$/, '');
  const file = await readAppFile(folder, pathname);
  if (file === null) return refuse(404, 'There is no such file.');
  return { status: 200, headers: headersFor(file.path), body: file.bytes };
}
