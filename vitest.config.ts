import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const here = (path: string): string => fileURLToPath(new URL(path, import.meta.url));
const testsIn = (...folders: string[]): string[] => folders.map((folder) => `tests/${folder}/**/*.test.{ts,tsx}`);

export default defineConfig({
  resolve: {
    alias: { '@': here('./').replace(/\/$/, ''), 'server-only': here('./tests/support/empty-module.ts') },
  },
  test: {
    maxWorkers: 2,
    setupFiles: ['./tests/support/matchers.ts'],
    projects: [
      {
        extends: true,
        test: {
          name: 'units',
          include: testsIn('unit', 'properties', 'golden', 'convergence', 'policy', 'architecture'),
          testTimeout: 30_000,
          // These tests share no state, and loading each module once halves the time.
          isolate: false,
          sequence: { groupOrder: 0 },
        },
      },
      {
        extends: true,
        test: {
          name: 'services',
          include: testsIn('db', 'http'),
          globalSetup: ['./tests/support/cluster.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
          sequence: { groupOrder: 1 },
        },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          include: testsIn('browser'),
          globalSetup: ['./tests/support/cluster.ts'],
          // One application and one Chromium at a time: two cores do not carry more.
          maxWorkers: 1,
          testTimeout: 120_000,
          hookTimeout: 180_000,
          sequence: { groupOrder: 2 },
        },
      },
    ],
  },
});
