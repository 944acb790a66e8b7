import { defineConfig } from 'vite';

/** The Node side: both shells, the command line and the worker threads. Packages stay outside the bundle. */
export default defineConfig({
  root: import.meta.dirname,
  build: {
    ssr: true,
    outDir: '../dist/app',
    emptyOutDir: true,
    target: 'node20',
    minify: false,
    rolldownOptions: {
      input: {
        main: 'app/electron/main.ts',
        loopback: 'app/loopback/main.ts',
        cli: 'app/cli/main.ts',
        'index.worker': 'app/host/library/index.worker.ts',
        'phantom.worker': 'app/host/phantom/phantom.worker.ts',
      },
      external: ['electron'],
      output: { entryFileNames: '[name].js', chunkFileNames: 'shared/[name]-[hash].js' },
    },
  },
});
