import { defineConfig } from 'vitest/config';

// What the mutants of a room are tried against: the fast tests of the room itself and the published values that touch it.
// Simulations, golden files and whole runs are left out: they take minutes, and a mutant that only they notice deserves
// a test of its own.
const PUBLISHED: Readonly<Record<string, readonly string[]>> = {
  statistics: ['test/external/statistics-*.test.ts'],
  superposition: ['test/external/superposition.test.ts'],
};
const room = process.env.ROOM ?? 'statistics';

export default defineConfig({
  test: {
    include: [`test/${room}/**/*.test.ts`, ...(PUBLISHED[room] ?? [])],
    exclude: ['test/**/*.simulation.test.ts', 'test/**/*.speed.test.ts', 'test/**/*.solver.test.ts'],
    testTimeout: 60_000,
    isolate: false,
  },
});
