import { createServer, type Server } from 'node:http';
import { compose, type Running } from './composition';
import { readConfig } from './config';
import { createLog } from './http/log';

/** How long running requests may take to end before they are cut off, and the process at the latest. */
const DRAIN_MS = 8_000;
const DEADLINE_MS = 15_000;

async function main(): Promise<void> {
  const config = readConfig(process.env);
  const log = createLog(config.logLevel);
  const running = await compose(config, log);
  const server = createServer(running.app);
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(config.port, config.host, resolve);
  });
  log.info({ host: config.host, port: config.port }, 'listening');
  const stopOnce = once(() => stop(server, running));
  process.on('SIGTERM', stopOnce);
  process.on('SIGINT', stopOnce);
}

/** Unready, drain, stop workers, close pools; cut off whatever is not done by the deadline. */
async function stop(server: Server, running: Running): Promise<void> {
  const { log } = running;
  log.info('stopping');
  running.becomeUnready();
  const deadline = setTimeout(() => {
    log.error('not everything ended in time; leaving it');
    process.exit(1);
  }, DEADLINE_MS);
  deadline.unref();
  const cutOff = setTimeout(() => server.closeAllConnections(), DRAIN_MS);
  running.endLivePages();
  await new Promise<void>((resolve) => {
    server.close(() => resolve());
    server.closeIdleConnections();
  });
  clearTimeout(cutOff);
  await running.stop();
  log.info('stopped');
}

function once(action: () => Promise<void>): () => void {
  let begun = false;
  return () => {
    if (begun) return;
    begun = true;
    action().catch((error: unknown) => fail(error));
  };
}

function fail(error: unknown): void {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exitCode = 1;
}

main().catch(fail);
