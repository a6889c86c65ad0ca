import { fileURLToPath } from 'node:url';
import react from '@vitejs/plugin-react';
import { defineConfig, type Plugin } from 'vite';

/** While developing, modules are swapped by inline scripts: the page's own policy, which forbids them, holds for the built page only. */
const policyOnlyWhenBuilt: Plugin = {
  name: 'policy-only-when-built',
  apply: 'serve',
  transformIndexHtml: (html) => html.replace(/<meta\s+http-equiv="Content-Security-Policy"[^>]*>/, ''),
};

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
        plugins: [react(), policyOnlyWhenBuilt],
        resolve: { alias: { 'maplibre-gl/dist/maplibre-gl.css': fileURLToPath(new URL('src/ui/plot/noMapStyle.css', import.meta.url)) } },
        define: { global: 'globalThis' },
        worker: { format: 'es' },
        build: { outDir: 'dist/web', target: 'es2022', chunkSizeWarningLimit: 2000 },
        preview: { host: '127.0.0.1' },
      },
);
