/**
 * The desktop shell, the solver process and the app. Everything is bundled, so that the window opens without reading
 * node_modules, and built for the Node and Chrome of Electron 33, the oldest one that it runs on.
 */
import { fileURLToPath } from 'node:url';
import { defineConfig, type UserConfig } from 'electron-vite';
import app from './vite.config';

const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));

export default defineConfig({
  main: {
    publicDir: false,
    build: {
      outDir: here('out/desktop/main'),
      target: 'node20',
      externalizeDeps: false,
      rolldownOptions: {
        input: { main: here('main/desktop/main.ts'), solver: here('solver/service/hosts/process.ts') },
        output: { format: 'es' },
      },
    },
  },
  preload: {
    publicDir: false,
    build: {
      outDir: here('out/desktop/preload'),
      target: 'node20',
      externalizeDeps: false,
      // A sandboxed preload is CommonJS, in one file.
      rolldownOptions: { input: here('main/desktop/preload.ts'), output: { format: 'cjs', entryFileNames: '[name].cjs' } },
    },
  },
  renderer: app as UserConfig['renderer'],
});
