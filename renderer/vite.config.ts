import { defineConfig } from 'vite';

/** The page and its workers. Nothing is inlined, so that the content security policy can forbid data: URLs. */
export default defineConfig({
  root: import.meta.dirname,
  base: './',
  oxc: { jsx: { runtime: 'automatic', importSource: 'preact' } },
  // The decoders name Node's modules, which they use only outside a browser.
  resolve: {
    alias: {
      fs: new URL('volumes/noNode.ts', import.meta.url).pathname,
      path: new URL('volumes/noNode.ts', import.meta.url).pathname,
    },
  },
  worker: { format: 'es' },
  build: {
    outDir: '../dist/renderer',
    emptyOutDir: true,
    assetsInlineLimit: 0,
    target: 'es2023',
    modulePreload: { polyfill: false },
    chunkSizeWarningLimit: 1500,
  },
});
