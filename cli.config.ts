/** The command in one file that runs by itself on Node 20.18 and later. */
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vite';

const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));
const { version } = JSON.parse(readFileSync(here('package.json'), 'utf8')) as { version: string };

export default defineConfig({
  root: here('.'),
  publicDir: false,
  define: { SOAKWRIGHT_VERSION: JSON.stringify(version) },
  ssr: { noExternal: true },
  build: {
    ssr: here('main/cli/soakwright.ts'),
    outDir: here('out/cli'),
    emptyOutDir: true,
    target: 'node20',
    minify: true,
    rolldownOptions: {
      output: { format: 'es', entryFileNames: 'soakwright.mjs', banner: '#!/usr/bin/env node' },
    },
  },
});
