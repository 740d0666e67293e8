/** The app, built once for both shells: the desktop's own scheme and the browser's server hand out the same files. */
import vue from '@vitejs/plugin-vue';
import { fileURLToPath } from 'node:url';
import { defineConfig, type Plugin } from 'vite';
import { PAGE_POLICY, WORKER_FOLDER } from './main/policy';

const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));

/** Writes the content policy into the page; only when built, for the development server injects inline styles. */
const policyIntoPage: Plugin = {
  name: 'policy-into-page',
  apply: 'build',
  transformIndexHtml: () => [
    { tag: 'meta', attrs: { 'http-equiv': 'Content-Security-Policy', content: PAGE_POLICY }, injectTo: 'head-prepend' },
  ],
};

export default defineConfig({
  root: here('app'),
  base: './',
  publicDir: false,
  plugins: [vue(), policyIntoPage],
  server: { host: '127.0.0.1', fs: { allow: [here('.')] } },
  build: {
    outDir: here('out/app'),
    emptyOutDir: true,
    target: 'es2022',
    minify: true,
    assetsInlineLimit: 0, // the policy allows no data: fonts
    modulePreload: { polyfill: false },
    reportCompressedSize: false,
    chunkSizeWarningLimit: 2000,
    rolldownOptions: { input: here('app/index.html') },
  },
  worker: {
    format: 'es',
    rolldownOptions: {
      output: { entryFileNames: `${WORKER_FOLDER}[name]-[hash].js`, chunkFileNames: `${WORKER_FOLDER}[name]-[hash].js` },
    },
  },
});
