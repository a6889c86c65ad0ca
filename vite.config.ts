import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

// The desk is built into dist/web, for any static host and any sub-path; `--mode cli` builds the terminal into dist/cli.
export default defineConfig(({ mode }) =>
  mode === 'cli'
    ? {
        publicDir: false,
        build: {
          outDir: 'dist/cli',
          target: 'node20',
          ssr: 'src/cli/main.ts',
          rollupOptions: { output: { entryFileNames: 'linewright.js' } },
        },
        ssr: { noExternal: true },
      }
    : {
        base: './',
        plugins: [react()],
        define: { global: 'globalThis' },
        worker: { format: 'es' },
        build: { outDir: 'dist/web', target: 'es2022', chunkSizeWarningLimit: 2000 },
        preview: { host: '127.0.0.1' },
      },
);
