import { svelte } from '@sveltejs/vite-plugin-svelte'
import { defineConfig } from 'vitest/config'

const report = process.env['STILLBED_TEST_REPORT']
const building = { globalSetup: ['test/setup/build.ts'] }

export default defineConfig({
  test: {
    reporters: report ? ['default', 'json'] : ['default'],
    ...(report ? { outputFile: { json: report } } : {}),
    projects: [
      { test: { name: 'core', include: ['test/core/**/*.test.ts'], testTimeout: 30_000 } },
      {
        test: {
          name: 'shell',
          include: ['test/electron/**/*.test.ts'],
          testTimeout: 60_000,
          hookTimeout: 90_000,
          ...building,
        },
      },
      {
        plugins: [svelte()],
        test: { name: 'pages', include: ['test/renderer/**/*.test.ts'], testTimeout: 30_000 },
      },
      {
        test: {
          name: 'journeys',
          include: ['test/journeys/**/*.test.ts'],
          testTimeout: 180_000,
          hookTimeout: 60_000,
          expect: { poll: { timeout: 30_000 } },
          fileParallelism: false,
          ...building,
        },
      },
    ],
  },
})
