import { useEffect } from 'react';

import { useToast } from '../ui';

const script = '/sw.js';

/**
 * Has the browser keep the pages' program, so that they open without a network. Registered when the page has loaded, so
 * that it costs the first view nothing. A newer program is fetched in the background and said; it is taken over with the next
 * load of a page, never under one that is being used.
 */
export function useOfflineShell() {
  const toast = useToast();
  useEffect(() => {
    if (process.env.NODE_ENV !== 'production' || typeof navigator === 'undefined') return;
    if (!('serviceWorker' in navigator)) return;
    const register = () => {
      navigator.serviceWorker
        .register(script, { updateViaCache: 'none' })
        .then((registration) => follow(registration, toast))
        // Private windows may refuse it: the pages then need a network.
        .catch(() => undefined);
    };
    if (document.readyState === 'complete') register();
    else window.addEventListener('load', register, { once: true });
    return () => window.removeEventListener('load', register);
  }, [toast]);
}

function follow(registration: ServiceWorkerRegistration, toast: ReturnType<typeof useToast>) {
  // This page came from the network with its newest program, so the one that waits for it may take over.
  if (navigator.onLine) takeOver(registration.waiting);
  registration.addEventListener('updatefound', () => {
    const next = registration.installing;
    next?.addEventListener('statechange', () => {
      if (next.state !== 'installed' || !navigator.serviceWorker.controller) return;
      toast({
        text: 'A newer version of these pages is here. It is used from the next load on.',
        action: { label: 'Load it now', onPress: () => reloadWith(next) },
      });
    });
  });
}

const takeOver = (worker: ServiceWorker | null) => worker?.postMessage({ type: 'SKIP_WAITING' });

function reloadWith(worker: ServiceWorker) {
  navigator.serviceWorker.addEventListener('controllerchange', () => window.location.reload(), {
    once: true,
  });
  takeOver(worker);
}
