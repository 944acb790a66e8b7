import { defineConfig } from 'vite';

/** The preload script. A sandboxed preload must be CommonJS in one file. */
export default defineConfig({
  root: import.meta.dirname,
  build: {
    ssr: true,
    outDir: '../../dist/app',
    emptyOutDir: false,
    target: 'node20',
    minify: false,
    rolldownOptions: {
      input: { preload: 'app/electron/preload.ts' },
      external: ['electron'],
      output: { format: 'cjs', entryFileNames: '[name].cjs' },
    },
  },
});
