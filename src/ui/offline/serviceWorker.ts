/// <reference lib="webworker" />

// Keeps the built page on the machine, so that it opens without a network. It serves what it kept at installation and never anything of another origin.
// vite.config.ts puts the list of files and their common hash in place of the two names below; a new build is another hash, hence another store.

export {};

declare const self: ServiceWorkerGlobalScope;
declare const __KEPT_FILES__: readonly string[];
declare const __BUILD_HASH__: string;

/** Stores of this page only: several copies may live under one origin. */
const FAMILY = `linewright ${self.registration.scope} `;
const STORE = FAMILY + __BUILD_HASH__;
/** The page under the address that every host answers without sending elsewhere: some lead from `index.html` to it. */
const page = () => self.registration.scope;

self.addEventListener('install', (event) => event.waitUntil(keepAll()));
self.addEventListener('activate', (event) => event.waitUntil(takeOver()));
self.addEventListener('fetch', (event) => {
  const { request } = event;
  if (request.method !== 'GET' || !request.url.startsWith(self.registration.scope)) return;
  event.respondWith(answer(request));
});
self.addEventListener('message', (event) => {
  if (event.data === 'take-over') void self.skipWaiting();
});

/** All files or none: half a page is worse than the old one. */
async function keepAll(): Promise<void> {
  const store = await caches.open(STORE);
  // past the browser's own cache: a host may let files of fixed names grow old there
  await store.addAll(__KEPT_FILES__.map((file) => new Request(new URL(file, self.registration.scope), { cache: 'reload' })));
}

async function takeOver(): Promise<void> {
  const names = await caches.keys();
  await Promise.all(names.filter((name) => name.startsWith(FAMILY) && name !== STORE).map((name) => caches.delete(name)));
  await self.clients.claim();
}

async function answer(request: Request): Promise<Response> {
  const store = await caches.open(STORE);
  const kept = await store.match(request.mode === 'navigate' ? page() : request, { ignoreSearch: request.mode === 'navigate' });
  return kept ?? fetch(request);
}
