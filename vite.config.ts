import { reactRouter } from '@react-router/dev/vite';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'vitest/config';

const quiet = ['./tests/support/quiet.ts'];

export default defineConfig(({ mode }) => ({
  // Under Vitest the modules run as they are; the framework's plugin would rewrite the routes for a browser.
  plugins: mode === 'test' ? [] : [tailwindcss(), reactRouter()],
  // Nothing small is put into the styles as data: the content security policy takes fonts from files only.
  build: { target: 'es2022', assetsInlineLimit: 0 },
  environments: {
    ssr: { build: { rollupOptions: { input: './app/server.ts' } } },
  },
  test: {
    // Two cores are the smallest machine the suite is meant for.
    maxWorkers: 2,
    passWithNoTests: false,
    projects: [
      { extends: true, test: { name: 'architecture', include: ['tests/architecture.test.ts'] } },
      // Pure code keeps nothing from one file to the next, so that its modules are loaded once.
      { extends: true, test: { name: 'unit', include: ['tests/unit/**/*.test.{ts,tsx}'], setupFiles: quiet, testTimeout: 60_000, isolate: false } },
      { extends: true, test: { name: 'handbook', include: ['tests/handbook/**/*.test.ts'], setupFiles: quiet, testTimeout: 60_000, isolate: false } },
      {
        extends: true,
        test: {
          name: 'db',
          include: ['tests/db/**/*.test.{ts,tsx}'],
          setupFiles: ['./tests/support/test-env.ts', ...quiet],
          globalSetup: ['./tests/support/template-database.ts'],
          pool: 'forks',
          testTimeout: 90_000,
          hookTimeout: 120_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'e2e',
          include: ['tests/e2e/**/*.spec.ts'],
          globalSetup: ['./tests/e2e/support/seeded-template.ts'],
          pool: 'forks',
          testTimeout: 240_000,
          hookTimeout: 240_000,
          // A page on a busy machine takes its time.
          expect: { poll: { timeout: 30_000, interval: 200 } },
        },
      },
    ],
  },
}));
