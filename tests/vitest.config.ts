import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('..', import.meta.url));

/** The core that the page's own units would import is packed by the build; they are tested without it. */
const projects = {
  units: { include: ['web/src/**/*.test.{ts,tsx}', 'tests/page/units/**/*.test.{ts,tsx}'], seconds: 10 },
  cores: { include: ['tests/module/**/*.test.ts', 'tests/calendars/**/*.test.ts'], seconds: 120 },
  pictures: { include: ['tests/page/pictures/**/*.test.ts'], seconds: 60 },
  browsers: { include: ['tests/page/browser/**/*.test.ts'], seconds: 60 },
};

export default defineConfig({
  root,
  cacheDir: resolve(process.env.FORWRIGHT_BUILD ?? resolve(root, 'build'), 'vitest'),
  esbuild: { jsx: 'automatic', jsxImportSource: 'preact' },
  test: {
    projects: Object.entries(projects).map(([name, { include, seconds }]) => ({
      extends: true as const,
      test: { name, include, testTimeout: seconds * 1000, hookTimeout: seconds * 1000 },
    })),
    pool: 'forks',
    maxWorkers: 2,
    minWorkers: 1,
    environment: 'node',
  },
});
