import { AppError } from '#shared/errors.ts';
import { downloadPrefix, type DownloadOffer } from './download-offer.ts';

/** Registers the service worker that turns streams into downloads; safe to call many times. */
export async function registerDownloads(): Promise<ServiceWorker> {
  if (!('serviceWorker' in navigator))
    throw new AppError('engine-failed', { reason: 'service-worker' });
  await navigator.serviceWorker.register(
    import.meta.env.DEV ? '/src/workers/download.service-worker.ts' : '/service-worker.js',
    { type: 'module', scope: '/' },
  );
  const registration = await navigator.serviceWorker.ready;
  if (!registration.active) throw new AppError('engine-failed', { reason: 'service-worker' });
  return registration.active;
}

/**
 * Starts an ordinary browser download fed from `port`. Resolves once the service worker has taken
 * the offer and the browser was sent to its address; returns a function to call when the
 * stream has ended.
 */
export async function offerDownload(offer: {
  fileName: string;
  bytes: number;
  port: MessagePort;
}): Promise<() => void> {
  const worker = await registerDownloads();
  const id = crypto.randomUUID();
  const taken = new Promise<void>((resolve, reject) => {
    const timer = setTimeout(
      () => reject(new AppError('engine-failed', { reason: 'service-worker' })),
      10_000,
    );
    navigator.serviceWorker.addEventListener('message', function listen(event) {
      const message = event.data as { kind?: string; id?: string };
      if (message.kind !== 'offer-taken' || message.id !== id) return;
      navigator.serviceWorker.removeEventListener('message', listen);
      clearTimeout(timer);
      resolve();
    });
  });
  navigator.serviceWorker.startMessages();
  worker.postMessage({ kind: 'offer', id, ...offer } satisfies DownloadOffer, [offer.port]);
  await taken;

  // A frame, because a link with `download` is not answered by service workers everywhere.
  const frame = document.createElement('iframe');
  frame.hidden = true;
  frame.src = `${downloadPrefix}${id}/${encodeURIComponent(offer.fileName)}`;
  document.body.append(frame);
  // Browsers end idle service workers after about half a minute, also in the middle of a stream.
  const keepAlive = setInterval(() => worker.postMessage({ kind: 'keep-alive' }), 10_000);
  return () => {
    clearInterval(keepAlive);
    // The frame stays a moment: removing it can stop a download that is still flushing.
    setTimeout(() => frame.remove(), 60_000);
  };
}
