import { svelte } from '@sveltejs/vite-plugin-svelte'
import { defineConfig } from 'vite'

export default defineConfig({
  root: 'renderer',
  base: './',
  plugins: [svelte()],
  build: {
    outDir: '../out/pages',
    emptyOutDir: true,
    target: 'es2023',
    chunkSizeWarningLimit: 1500,
    // the pages' security policy lets fonts come from files only, never from inlined text
    assetsInlineLimit: 0,
  },
  worker: { format: 'es' },
})
