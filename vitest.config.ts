import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['tests/**/*.test.ts'],
    exclude: ['tests/browser/**'],
    setupFiles: ['tests/house/noStrayWarnings.ts'],
    testTimeout: 60_000,
    pool: 'threads',
  },
});
