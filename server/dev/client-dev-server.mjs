import { createServer } from 'vite';
import { checkout } from './checkout.mjs';
import { loopback } from './ports.mjs';

/**
 * Vite's development server with hot reload, run as a program of its own with two ports: where it
 * listens, and where the Express server does. Browsers see one origin, so cookies and the check
 * of the Origin header work as in production.
 */

const [, , port, serverPort] = process.argv;
const toServer = { target: `http://${loopback}:${serverPort}` };

const server = await createServer({
  root: checkout,
  clearScreen: false,
  server: {
    host: loopback,
    port: Number(port),
    strictPort: true,
    proxy: { '/api': toServer, '/healthz': toServer, '/readyz': toServer },
    // Databases and logs change all the time and are no source.
    watch: { ignored: ['**/.data/**', '**/.cache/**', '**/dist/**', '**/test-results/**'] },
  },
});
await server.listen();

process.on('SIGTERM', () => void server.close().then(() => process.exit(0)));
