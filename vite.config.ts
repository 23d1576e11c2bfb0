import { fileURLToPath } from 'node:url';

import { quasar, transformAssetUrls } from '@quasar/vite-plugin';
import vue from '@vitejs/plugin-vue';
import { defineConfig } from 'vitest/config';

const apiTarget = process.env['OXYMEL_API'] ?? 'http://127.0.0.1:3000';
const sassVariables = fileURLToPath(new URL('./src/css/quasar-variables.sass', import.meta.url));

/** The client build and, in `test.projects`, one Vitest project for each kind of test. */
export default defineConfig({
  plugins: [vue({ template: { transformAssetUrls } }), quasar({ sassVariables })],
  build: { outDir: 'dist/web', emptyOutDir: true, target: 'es2022', chunkSizeWarningLimit: 700 },
  server: {
    port: 5173,
    strictPort: true,
    proxy: { '/api': { target: apiTarget } },
    watch: { ignored: ['**/.data/**'] },
  },
  test: {
    projects: [
      { test: { name: 'unit', environment: 'node', include: ['tests/unit/**/*.test.ts'] } },
      { test: { name: 'reference', environment: 'node', include: ['tests/reference/**/*.test.ts'] } },
      {
        test: {
          name: 'property',
          environment: 'node',
          include: ['tests/property/**/*.test.ts'],
          setupFiles: ['tests/support/property-setup.ts'],
        },
      },
      {
        plugins: [vue({ template: { transformAssetUrls } }), quasar({ sassVariables: false })],
        test: {
          name: 'component',
          environment: 'happy-dom',
          include: ['tests/component/**/*.test.ts'],
          setupFiles: ['tests/support/component-setup.ts'],
        },
      },
      {
        test: {
          name: 'api',
          environment: 'node',
          include: ['tests/api/**/*.test.ts', 'tests/regression/**/*.test.ts'],
          globalSetup: ['tests/support/postgres-setup.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      {
        test: {
          name: 'browser',
          environment: 'node',
          include: ['tests/browser/**/*.test.ts'],
          globalSetup: ['tests/support/browser-setup.ts'],
          testTimeout: 120_000,
          hookTimeout: 120_000,
          fileParallelism: false,
        },
      },
    ],
  },
});
