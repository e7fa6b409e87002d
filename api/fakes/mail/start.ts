import { createWriteStream, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { pipeline } from 'node:stream/promises';
import { randomUUID } from 'node:crypto';
import { SMTPServer } from 'smtp-server';

export interface MailStandIn {
  url: string;
  stop(): Promise<void>;
}

/** A mail server on loopback that takes every message and keeps it as a file; nothing leaves the machine. */
export const startMailStandIn = async (folder: string, port = 0): Promise<MailStandIn> => {
  mkdirSync(folder, { recursive: true });
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    size: 1024 * 1024,
    onData: (stream, _session, done) => {
      const name = `${new Date().toISOString().replaceAll(':', '-')}-${randomUUID().slice(0, 8)}.eml`;
      pipeline(stream, createWriteStream(join(folder, name))).then(() => done(), done);
    },
  });
  server.on('error', () => undefined);
  const listener = server.server;
  await new Promise<void>((resolve, reject) => {
    listener.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve());
  });
  const address = listener.address();
  return {
    url: `smtp://127.0.0.1:${typeof address === 'object' && address ? address.port : port}`,
    stop: () => new Promise((resolve) => server.close(() => resolve())),
  };
};
