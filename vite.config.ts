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
    manifest: true,
    // Every browser that can run the check knows modulepreload; the first page stays lighter.
    modulePreload: { polyfill: false },
    rolldownOptions: {
      // How long the build's plug-ins took is no news to whoever starts the product.
      checks: { pluginTimings: false },
      input: {
        main: 'index.html',
        'service-worker': 'src/workers/download.service-worker.ts',
      },
      output: {
        // A service worker rules over the folder it is served from and is found by its address.
        entryFileNames: (chunk) =>
          chunk.name === 'service-worker' ? '[name].js' : 'assets/[name]-[hash].js',
      },
    },
  },
  // In development the service worker is served from src/ but must rule over the whole site.
  server: { headers: { 'Service-Worker-Allowed': '/' } },
  worker: { format: 'es' },
});
