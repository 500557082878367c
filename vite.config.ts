import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

/** The browser client. Server and command line are built by server/dev/build.mjs. */
export default defineConfig({
  plugins: [react(), tailwindcss()],
  publicDir: 'src/public',
  build: {
    outDir: 'dist/client',
    emptyOutDir: true,
    // Nothing is inlined: the content security policy forbids data: WebAssembly and scripts.
    assetsInlineLimit: 0,
    sourcemap: true,
  },
  worker: { format: 'es' },
});
