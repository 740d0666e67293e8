import vue from '@vitejs/plugin-vue';
import { defineConfig } from 'vitest/config';

/** A project a folder: `npx vitest run --project unit`. */
const project = (name: string, more: object = {}) => ({
  extends: true as const,
  test: { name, include: [`tests/${name}/**/*.test.ts`], ...more },
});

/** The real window and the real browser: one at a time, and slow machines are not failures. */
const endToEnd = {
  testTimeout: 180_000,
  hookTimeout: 180_000,
  expect: { poll: { timeout: 30_000 } },
  fileParallelism: false,
  maxWorkers: 1,
};

export default defineConfig({
  plugins: [vue()],
  test: {
    projects: [
      project('unit', { testTimeout: 20_000 }),
      project('published', { testTimeout: 60_000 }),
      project('property', { testTimeout: 60_000 }),
      project('protocol'),
      project('migrations'),
      project('app', { environment: 'happy-dom', testTimeout: 20_000 }),
      project('end-to-end/chromium', endToEnd),
      project('end-to-end/electron', endToEnd),
    ],
    coverage: {
      provider: 'v8',
      include: ['solver/**/*.ts', 'app/**/*.{ts,vue}', 'main/**/*.ts'],
      reporter: ['text-summary', 'json-summary', 'html'],
    },
  },
});
