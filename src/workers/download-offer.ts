/** Addresses the service worker answers itself; nothing is served there otherwise. */
export const downloadPrefix = '/download/';

/** A stream offered under `/download/<id>/…`; the port is the reading end of a stream port. */
export type DownloadOffer = {
  kind: 'offer';
  id: string;
  fileName: string;
  bytes: number;
  port: MessagePort;
};
