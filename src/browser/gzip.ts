/** Compresses with the browser's own gzip (RFC 1952). */
export async function gzip(bytes: Uint8Array<ArrayBuffer>): Promise<Uint8Array<ArrayBuffer>> {
  return through(bytes, new CompressionStream('gzip'));
}

/** Unpacks gzip. Rejects with a TypeError for anything that is not. */
export async function gunzip(bytes: Uint8Array<ArrayBuffer>): Promise<Uint8Array<ArrayBuffer>> {
  return through(bytes, new DecompressionStream('gzip'));
}

async function through(
  bytes: Uint8Array<ArrayBuffer>,
  transform: CompressionStream | DecompressionStream,
): Promise<Uint8Array<ArrayBuffer>> {
  const answer = new Response(new Blob([bytes]).stream().pipeThrough(transform));
  return new Uint8Array(await answer.arrayBuffer());
}
