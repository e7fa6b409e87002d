import { createServer } from 'node:net';

/** A loopback port that nobody listens on at this moment. */
export const freePort = (): Promise<number> =>
  new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address();
      const port = typeof address === 'object' && address !== null ? address.port : 0;
      probe.close(() => resolve(port));
    });
  });

/** Is this port taken on this host? */
export const portIsTaken = (port: number, host: string): Promise<boolean> =>
  new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', (error: NodeJS.ErrnoException) => (error.code === 'EADDRINUSE' ? resolve(true) : reject(error)));
    probe.listen(port, host, () => probe.close(() => resolve(false)));
  });
