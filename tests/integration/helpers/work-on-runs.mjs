/**
 * A process that works on stored runs as the server does, until it is killed: `node work-on-runs.mjs`, with DATABASE_URL
 * set. Says `ready` once it looks for runs.
 */
import { createServer } from 'vite';

const server = await createServer({
	server: { middlewareMode: true, hmr: false, ws: false, watch: null },
	appType: 'custom',
	logLevel: 'error',
	optimizeDeps: { noDiscovery: true }
});
const { startJobs } = await server.ssrLoadModule('/src/lib/server/jobs/index.ts');
startJobs();
process.stdout.write('ready\n');
// The queue's own timer does not hold the process.
setInterval(() => {}, 60_000);
