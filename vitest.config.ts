import { svelte } from '@sveltejs/vite-plugin-svelte'
import { defineConfig } from 'vitest/config'

export default defineConfig({
  test: {
    projects: [
      { test: { name: 'core', include: ['test/core/**/*.test.ts'], testTimeout: 30_000 } },
      {
        test: {
          name: 'shell',
          include: ['test/electron/**/*.test.ts'],
          testTimeout: 30_000,
          globalSetup: ['test/setup/build.ts'],
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
          testTimeout: 120_000,
          hookTimeout: 60_000,
          fileParallelism: false,
          globalSetup: ['test/setup/build.ts'],
        },
      },
    ],
  },
})
