import { createServer } from 'node:http';
import { createApp } from './app.ts';
import { readConfig } from './config/config.ts';
import { makeDeps } from './lib/make-deps.ts';
import { runUntilTold } from './lib/run-until-told.ts';

/** The web process: answers requests, sends jobs, does no estimating. */
const deps = await makeDeps(readConfig());
const { config, log } = deps;
const server = createServer(createApp(deps));
// A whole upload must arrive in ten minutes; headers in one.
server.requestTimeout = 600_000;
server.headersTimeout = 60_000;

await new Promise<void>((resolve, reject) => {
  server.once('error', reject);
  server.listen(config.port, config.host, resolve);
});
log.info({ host: config.host, port: config.port }, 'listening');

runUntilTold(log, async () => {
  const closed = new Promise((resolve) => server.close(resolve));
  server.closeIdleConnections();
  const hurry = setTimeout(() => server.closeAllConnections(), 5_000);
  await closed;
  clearTimeout(hurry);
  await deps.close();
});
