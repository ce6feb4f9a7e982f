import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('.', import.meta.url));
const alias = {
  '@': root.replace(/\/$/, ''),
  'server-only': fileURLToPath(new URL('./tests/server-only.ts', import.meta.url)),
};

// unit and reference need nothing but Node and Debian's packages; integration and api need the test database that test.sh starts.
export default defineConfig({
  resolve: { alias },
  test: {
    projects: [
      { resolve: { alias }, test: { name: 'unit', include: ['tests/unit/**/*.test.{ts,tsx}'], testTimeout: 20_000 } },
      {
        resolve: { alias },
        test: { name: 'reference', include: ['tests/reference/**/*.test.ts'], testTimeout: 120_000 },
      },
      {
        resolve: { alias },
        test: {
          name: 'integration',
          include: ['tests/integration/**/*.test.ts'],
          testTimeout: 60_000,
          hookTimeout: 120_000,
          fileParallelism: false,
        },
      },
      {
        resolve: { alias },
        test: {
          name: 'api',
          include: ['tests/api/**/*.test.ts'],
          testTimeout: 60_000,
          hookTimeout: 120_000,
          fileParallelism: false,
        },
      },
      {
        resolve: { alias },
        test: {
          name: 'browser',
          include: ['tests/browser/**/*.test.ts'],
          testTimeout: 180_000,
          hookTimeout: 180_000,
          fileParallelism: false,
        },
      },
      {
        resolve: { alias },
        test: {
          name: 'faults',
          include: ['tests/faults/**/*.test.ts'],
          testTimeout: 600_000,
          hookTimeout: 180_000,
          fileParallelism: false,
        },
      },
    ],
  },
});
