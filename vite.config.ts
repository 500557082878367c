import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { createHash } from 'node:crypto';
import { defineConfig, type Plugin } from 'vite';

/**
 * Tells the service worker which files the application consists of, so that it opens without a
 * network.
 */
function tellServiceWorker(): Plugin {
  return {
    name: 'tell-service-worker',
    apply: 'build',
    enforce: 'post',
    generateBundle(_, bundle) {
      const worker = bundle['service-worker.js'];
      if (worker?.type !== 'chunk') return;
      const built = Object.keys(bundle).filter((file) => /^assets\/.*(?<!\.map)$/.test(file));
      const files = [...built.map((file) => `/${file}`), '/theme.js', '/icon.svg'].sort();
      const version = createHash('sha256').update(files.join()).digest('hex').slice(0, 16);
      worker.code = `self.flightcaseShell=${JSON.stringify({ version, files })};\n${worker.code}`;
    },
  };
}

/** The browser client. Server and command line are built by server/dev/build.mjs. */
export default defineConfig({
  plugins: [react(), tailwindcss(), tellServiceWorker()],
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
