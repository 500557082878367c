import { useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { registerDownloads } from '../workers/offer-download.ts';
import { toastDone } from '../ui/toast.tsx';
import { storeWaiting } from './waiting-checks.ts';

/**
 * Makes the bench work without a network (its service worker keeps the application), and sends
 * reports that waited for one as soon as it is back.
 */
export function useOffline(): void {
  const queries = useQueryClient();
  useEffect(() => {
    // Without it the bench still works; only not without a network.
    registerDownloads().catch(() => undefined);
    const send = (): void => {
      storeWaiting().then(
        (stored) => {
          if (stored === 0) return;
          toastDone(
            stored === 1
              ? 'The waiting report is stored.'
              : `${String(stored)} waiting reports are stored.`,
          );
          void queries.invalidateQueries();
        },
        // A browser that keeps nothing has nothing waiting.
        () => undefined,
      );
    };
    send();
    addEventListener('online', send);
    return () => removeEventListener('online', send);
  }, [queries]);
}
