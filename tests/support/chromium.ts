/** Debian's Chromium, and nothing of it that talks to the outside. */
export const chromiumFlags = [
  // Chromium refuses its sandbox to root, which is who runs it in containers.
  ...(process.getuid?.() === 0 ? ['--no-sandbox'] : []),
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];
