import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    include: ['test/**/*.test.ts'],
    exclude: ['test/browser/**', 'test/bench/**'],
    // every core: the default leaves one idle, which on two is half the time
    maxWorkers: '100%',
    // files share the modules of their process: loading the engine anew for each takes a second of the processor
    isolate: false,
    testTimeout: 120_000,
    hookTimeout: 120_000,
  },
});
