import { defineConfig } from 'vite';

/** The panels with invented data, to be looked at: `npx vite build --config tests/gallery/vite.config.ts`. */
export default defineConfig({
  root: import.meta.dirname,
  base: './',
  oxc: { jsx: { runtime: 'automatic', importSource: 'preact' } },
  build: {
    outDir: '../../dist/gallery',
    emptyOutDir: true,
    assetsInlineLimit: 0,
    target: 'es2023',
    modulePreload: { polyfill: false },
  },
});
