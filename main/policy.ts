/**
 * What pages of the app may do, said once for all who serve them: the build, the browser's server and the desktop's scheme.
 *
 * Nothing but the app's own files: no inline code, no eval, no network, no frames.
 */
const PAGE_RULES = [
  "default-src 'none'",
  "script-src 'self'",
  "style-src 'self'",
  "font-src 'self'",
  "img-src 'self' data: blob:",
  "worker-src 'self'",
  "base-uri 'none'",
  "form-action 'none'",
];

/** For the page's own meta element, where a frame rule has no effect. */
export const PAGE_POLICY = PAGE_RULES.join('; ');

/** Folder of the built app that holds the solver's worker: a worker obeys the policy of its own response. */
export const WORKER_FOLDER = 'solver/';
const WORKER_POLICY = "default-src 'none'; script-src 'self'";

/** Headers of every response; `path` is relative to the built app. */
export function headersFor(path: string): Record<string, string> {
  return {
    'Content-Security-Policy': path.startsWith(WORKER_FOLDER) ? WORKER_POLICY : `${PAGE_POLICY}; frame-ancestors 'none'`,
    'Content-Type': contentType(path),
    'Cross-Origin-Opener-Policy': 'same-origin',
    'Cross-Origin-Resource-Policy': 'same-origin',
    'Referrer-Policy': 'no-referrer',
    'X-Content-Type-Options': 'nosniff',
  };
}

const TYPES: Record<string, string> = {
  html: 'text/html; charset=utf-8',
  js: 'text/javascript; charset=utf-8',
  css: 'text/css; charset=utf-8',
  json: 'application/json; charset=utf-8',
  svg: 'image/svg+xml',
  png: 'image/png',
  ico: 'image/x-icon',
  woff2: 'font/woff2',
  txt: 'text/plain; charset=utf-8',
};

function contentType(path: string): string {
  const ending = /\.(\w+)$/.exec(path)?.[1] ?? '';
  return TYPES[ending] ?? 'application/octet-stream';
}
