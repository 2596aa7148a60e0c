// Test runner settings: one fixed seed for every property test, time for the slower machines.
import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['tests/**/*.test.ts'],
    setupFiles: ['tests/setup.ts'],
    testTimeout: 60_000,
    hookTimeout: 60_000,
    allowOnly: false,
    env: { NO_COLOR: '1' },
  },
});
