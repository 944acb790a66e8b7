import { defineConfig } from 'vite';

/** The benchmarks as plain Node programs; packages stay outside the bundle. */
export default defineConfig({
  root: import.meta.dirname,
  build: {
    ssr: true,
    outDir: '../../dist/bench',
    emptyOutDir: true,
    target: 'node20',
    minify: false,
    rolldownOptions: {
      input: {
        bench: 'tests/bench/bench.ts',
        evidence: 'tests/bench/evidence.ts',
        'decodeBench.worker': 'tests/bench/decodeBench.worker.ts',
      },
      output: { entryFileNames: '[name].js' },
    },
  },
});
