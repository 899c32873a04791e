import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('..', import.meta.url));

export default defineConfig({
  root,
  test: {
    include: ['tests/**/*.test.ts', 'tests/**/*.test.tsx'],
    // what is tried as a process or in a browser is the build; one build serves every file
    globalSetup: ['tests/support/build-once.ts'],
    setupFiles: ['tests/support/published.ts'],
    // the default leaves a core idle
    maxWorkers: '100%',
    testTimeout: 60_000,
    hookTimeout: 120_000,
  },
});
