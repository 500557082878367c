/**
 * Text of a chunk up to its first NUL. Old formats name no character set: UTF-8 where the bytes
 * are valid UTF-8, Latin-1 otherwise. Spaces around it are dropped.
 */
export function decodeChunkText(bytes: Uint8Array): string {
  const nul = bytes.indexOf(0);
  const text = nul === -1 ? bytes : bytes.subarray(0, nul);
  return (decodeUtf8(text) ?? decodeLatin1(text)).trim();
}

/** null where the bytes are no valid UTF-8. A byte order mark stays in the text. */
export function decodeUtf8(bytes: Uint8Array): string | null {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return null;
  }
}

export function decodeLatin1(bytes: Uint8Array): string {
  let text = '';
  for (const byte of bytes) text += String.fromCharCode(byte);
  return text;
}
