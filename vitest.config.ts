import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

export default defineConfig({
  resolve: { alias: { '~': fileURLToPath(new URL('./src', import.meta.url)) } },
  test: {
    testTimeout: 60_000,
    hookTimeout: 60_000,
    pool: 'forks',
    projects: [
      {
        extends: true,
        test: {
          name: 'core',
          include: ['tests/{unit,property,reference,architecture}/**/*.test.ts'],
          setupFiles: ['tests/helpers/property-seed.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'server',
          include: ['tests/{db,http,fault}/**/*.test.ts'],
          globalSetup: ['tests/helpers/global-setup.ts'],
        },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          include: ['tests/e2e/**/*.test.ts'],
          globalSetup: ['tests/helpers/global-setup.ts'],
          // One browser at a time: two on two cores would wait for each other.
          poolOptions: { forks: { singleFork: true } },
          testTimeout: 180_000,
          // What a page sends when it has settled takes its time on a busy machine.
          expect: { poll: { timeout: 10_000 } },
        },
      },
    ],
  },
});
