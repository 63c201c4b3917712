import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const alias = {
  '@': fileURLToPath(new URL('../src', import.meta.url)),
  '@workers': fileURLToPath(new URL('../workers', import.meta.url)),
};

// One project a kind of test: the engine under plain Node, the server under plain Node with a scratch database,
// React parts under happy-dom. Browser tests and benches have their own commands.
export default defineConfig({
  root: fileURLToPath(new URL('..', import.meta.url)),
  resolve: { alias },
  test: {
    pool: 'forks',
    maxWorkers: 2,
    projects: [
      {
        extends: true,
        test: {
          name: 'core',
          include: ['tests/{core,contracts,reference,house}/**/*.test.ts'],
          environment: 'node',
          testTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'server',
          include: ['tests/{server,client,faults}/**/*.test.ts'],
          environment: 'node',
          testTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: { name: 'clients', include: ['tests/clients/**/*.test.ts'], environment: 'node', testTimeout: 120_000 },
      },
      {
        extends: true,
        test: { name: 'browser', include: ['tests/browser/**/*.test.ts'], environment: 'node', testTimeout: 300_000 },
      },
      {
        extends: true,
        test: { name: 'long', include: ['tests/long/**/*.test.ts'], environment: 'node', testTimeout: 3_600_000 },
      },
      {
        extends: true,
        esbuild: { jsx: 'automatic' },
        test: { name: 'components', include: ['tests/components/**/*.test.tsx'], environment: 'happy-dom' },
      },
    ],
  },
});
