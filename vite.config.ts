import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import react from '@vitejs/plugin-react';
import { defineConfig, type Plugin } from 'vite';

/** While developing, modules are swapped by inline scripts: the page's own policy, which forbids them, holds for the built page only. */
const policyOnlyWhenBuilt: Plugin = {
  name: 'policy-only-when-built',
  apply: 'serve',
  transformIndexHtml: (html) => html.replace(/<meta\s+http-equiv="Content-Security-Policy"[^>]*>/, ''),
};

/** The one file of the build with a fixed name besides the page: a browser looks there for a newer build. */
const OFFLINE = 'offline.js';
/** Not part of the page: the picture of the README. */
const NOT_KEPT = /(^|\/)desk\.png$/;

/** Tells the service worker which files the build consists of and hashes their contents into its version. */
const offlineList: Plugin = {
  name: 'offline-list',
  apply: 'build',
  enforce: 'post',
  generateBundle: {
    order: 'post',
    handler(_, bundle) {
      const worker = bundle[OFFLINE];
      if (worker?.type !== 'chunk') return;
      const contents = new Map<string, string | Uint8Array>();
      for (const [name, file] of Object.entries(bundle))
        if (name !== OFFLINE) contents.set(name, file.type === 'chunk' ? file.code : file.source);
      const publicDir = fileURLToPath(new URL('public', import.meta.url));
      for (const name of filesBelow(publicDir)) if (!NOT_KEPT.test(name)) contents.set(name, readFileSync(join(publicDir, name)));
      const names = [...contents.keys()].sort();
      const hash = createHash('sha256');
      for (const name of names) hash.update(name).update(contents.get(name) ?? '');
      worker.code = worker.code
        .replace('__KEPT_FILES__', JSON.stringify(names.map((name) => (name === 'index.html' ? './' : name))))
        .replace('__BUILD_HASH__', JSON.stringify(hash.digest('hex').slice(0, 16)));
    },
  },
};

const filesBelow = (folder: string, below = ''): string[] =>
  readdirSync(join(folder, below), { withFileTypes: true }).flatMap((entry) => {
    const path = below ? `${below}/${entry.name}` : entry.name;
    return entry.isDirectory() ? filesBelow(folder, path) : [path];
  });

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
        plugins: [react(), policyOnlyWhenBuilt, offlineList],
        resolve: { alias: { 'maplibre-gl/dist/maplibre-gl.css': fileURLToPath(new URL('src/ui/plot/noMapStyle.css', import.meta.url)) } },
        define: { global: 'globalThis' },
        worker: { format: 'es' },
        build: {
          outDir: 'dist/web',
          target: 'es2022',
          chunkSizeWarningLimit: 2000,
          rollupOptions: {
            input: { index: 'index.html', offline: fileURLToPath(new URL('src/ui/offline/serviceWorker.ts', import.meta.url)) },
            output: { entryFileNames: ({ name }) => (name === 'offline' ? OFFLINE : 'assets/[name]-[hash].js') },
          },
        },
        preview: { host: '127.0.0.1' },
      },
);
