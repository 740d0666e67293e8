/** The app's own scheme: its built files under one origin, with the content policy in every response. */
import { protocol } from 'electron';
import { readAppFile } from '../appFiles';
import { headersFor } from '../policy';

export const ORIGIN = 'app://soakwright';

/** Before the app is ready. A standard, secure scheme has storage, an origin of its own and cached code. */
export function registerScheme(): void {
  protocol.registerSchemesAsPrivileged([
    { scheme: 'app', privileges: { standard: true, secure: true, supportFetchAPI: true, codeCache: true } },
  ]);
}

export function serveApp(folder: string): void {
  protocol.handle('app', async (request) => {
    const { host, pathname } = new URL(request.url);
    const file = host === 'soakwright' && request.method === 'GET' ? await readAppFile(folder, pathname) : null;
    if (file === null) return new Response('There is no such file.', { status: 404, headers: headersFor('missing.txt') });
    return new Response(new Uint8Array(file.bytes), { headers: headersFor(file.path) });
  });
}
