import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

export default defineConfig({
  resolve: {
    alias: [
      // The one module of the report that only the build makes.
      {
        find: /^.*\/view-bundle\.js$/,
        replacement: fileURLToPath(new URL('./dist/report/view/view-bundle.js', import.meta.url)),
      },
    ],
  },
  test: {
    include: ['test/**/*.test.ts'],
    setupFiles: ['test/helpers/fixed-seeds.ts'],
    testTimeout: 120_000,
    hookTimeout: 120_000,
    maxWorkers: 2,
  },
});
