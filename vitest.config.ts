import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const alias = { '@shared': fileURLToPath(new URL('./shared', import.meta.url)) };

/** One project a kind of test; component specs run under `ng test`, browser stories under Playwright. */
export default defineConfig({
  test: {
    // sqlite3 is a native addon that must not be shared between threads.
    pool: 'forks',
    projects: [
      { resolve: { alias }, test: { name: 'unit', include: ['tests/unit/**/*.test.ts'] } },
      {
        resolve: { alias },
        test: { name: 'reference', include: ['tests/reference/**/*.test.ts'], testTimeout: 120_000 },
      },
      {
        resolve: { alias },
        test: { name: 'api', include: ['tests/api/**/*.test.ts'], testTimeout: 60_000, hookTimeout: 60_000 },
      },
      {
        resolve: { alias },
        test: { name: 'bench', include: [], benchmark: { include: ['tests/bench/**/*.bench.ts'] } },
      },
    ],
  },
});
