import { setDesk } from '../desk/deskStore.ts';

let waiting: ServiceWorker | undefined;

/** Has the built page kept on this machine; says so when a newer build waits to take over. A browser that cannot do it goes on without. */
export async function keepOffline(): Promise<void> {
  if (!import.meta.env.PROD || !('serviceWorker' in navigator)) return;
  const registration = await navigator.serviceWorker.register(new URL('offline.js', document.baseURI)).catch(() => undefined);
  if (!registration) return;
  const look = () => {
    if (!registration.waiting || !navigator.serviceWorker.controller) return;
    waiting = registration.waiting;
    setDesk({ newBuild: true });
  };
  look();
  registration.addEventListener('updatefound', () => {
    registration.installing?.addEventListener('statechange', look);
  });
}

/** Lets the newer build take over and opens it. */
export function takeNewBuild(): void {
  navigator.serviceWorker.addEventListener('controllerchange', () => window.location.reload(), { once: true });
  waiting?.postMessage('take-over');
}
