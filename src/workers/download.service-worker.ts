/// <reference lib="webworker" />
import { answerFromShell, dropOldShells, keepShell, type AppShell } from './app-shell.ts';
import { streamFromPort } from './stream-port.ts';
import { downloadPrefix, type DownloadOffer } from './download-offer.ts';

/**
 * Keeps the application for times without a network, and turns a stream made in a tab into an
 * ordinary download, for browsers without a save picker: the page offers a stream under an
 * address, then opens that address; the bytes go to disk as they come and are never held in
 * memory or stored twice.
 */
declare const self: ServiceWorkerGlobalScope & {
  /** Put in front of this file by the build (vite.config.ts); not there in development. */
  flightcaseShell?: AppShell;
};

const shell = self.flightcaseShell;

const offers = new Map<string, DownloadOffer>();

self.addEventListener('install', (event) => {
  void self.skipWaiting();
  // Downloads do not wait for this: a worker that waits is not there when a zip is saved.
  if (shell) void keepShell(shell);
  event.waitUntil(Promise.resolve());
});
self.addEventListener('activate', (event) => {
  event.waitUntil(Promise.all([self.clients.claim(), shell && dropOldShells(shell)]));
});

self.addEventListener('message', (event: ExtendableMessageEvent) => {
  const message = event.data as DownloadOffer | { kind: 'keep-alive' };
  // Any message prolongs this worker's life; a long download is kept alive by its page.
  if (message.kind !== 'offer') return;
  offers.set(message.id, message);
  (event.source as Client | null)?.postMessage({ kind: 'offer-taken', id: message.id });
});

self.addEventListener('fetch', (event: FetchEvent) => {
  const url = new URL(event.request.url);
  if (url.origin !== self.location.origin) return;
  if (!url.pathname.startsWith(downloadPrefix)) {
    const answer = shell && answerFromShell(shell, event.request);
    if (answer) event.respondWith(answer);
    return;
  }
  const id = url.pathname.slice(downloadPrefix.length).split('/')[0]!;
  const offer = offers.get(id);
  if (!offer) {
    event.respondWith(new Response('This download is over.', { status: 410 }));
    return;
  }
  offers.delete(id);
  event.respondWith(
    new Response(streamFromPort(offer.port), {
      headers: {
        'Content-Type': 'application/zip',
        'Content-Length': String(offer.bytes),
        'Content-Disposition': `attachment; filename*=UTF-8''${encodeRfc5987(offer.fileName)}`,
        'X-Content-Type-Options': 'nosniff',
      },
    }),
  );
});

/** RFC 8187: what encodeURIComponent leaves but the header grammar does not allow. */
function encodeRfc5987(text: string): string {
  return encodeURIComponent(text).replace(
    /['()*]/g,
    (character) => `%${character.charCodeAt(0).toString(16).toUpperCase()}`,
  );
}
