import { createServer, type AddressInfo } from 'node:net';

/** Loopback is the only interface that anything here ever listens on. */
export const LOOPBACK = '127.0.0.1';

/**
 * A TCP port on loopback that nobody used a moment ago. Another program may still take it before the caller does,
 * so whoever binds it must be ready to ask again.
 */
export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.unref();
    probe.once('error', reject);
    probe.listen(0, LOOPBACK, () => {
      const { port } = probe.address() as AddressInfo;
      probe.close(() => resolve(port));
    });
  });
}

/** Why a port cannot be listened on, or undefined when it can. */
export function portTrouble(port: number, host: string = LOOPBACK): Promise<'taken' | 'forbidden' | undefined> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', (error: NodeJS.ErrnoException) => {
      if (error.code === 'EADDRINUSE') resolve('taken');
      else if (error.code === 'EACCES') resolve('forbidden');
      else reject(error);
    });
    probe.listen({ port, host, exclusive: true }, () => probe.close(() => resolve(undefined)));
  });
}
