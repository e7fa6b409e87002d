import type { Server } from 'node:http';
import { isLoopback } from '#api/config/config.ts';
import { createStandIn, type StandInOptions } from './app.ts';

export interface GoogleStandIn {
  authorizationUrl: string;
  tokenUrl: string;
  userinfoUrl: string;
  stop(): Promise<void>;
}

export interface StandInPlan extends StandInOptions {
  publicUrl: string;
  /** Set when the registry has credentials of the real service. */
  realClientId?: string | undefined;
  port?: number;
}

/** Starts the stand-in on a loopback listener of its own. It has no place beside real credentials or a public address. */
export const startGoogleStandIn = async ({ publicUrl, realClientId, port = 0, ...options }: StandInPlan): Promise<GoogleStandIn> => {
  if (realClientId) throw new Error('The stand-in for sign-in does not start: GOOGLE_CLIENT_ID is set, so the real service is in use.');
  if (!isLoopback(publicUrl)) throw new Error(`The stand-in for sign-in does not start: ${publicUrl} is a public address, where anyone could be anybody. Set GOOGLE_CLIENT_ID and GOOGLE_CLIENT_SECRET.`);
  const server = await new Promise<Server>((resolve, reject) => {
    const listening = createStandIn(options).listen(port, '127.0.0.1', (fault?: Error) => (fault ? reject(fault) : resolve(listening)));
  });
  const address = server.address();
  const base = `http://127.0.0.1:${typeof address === 'object' && address ? address.port : port}`;
  return {
    authorizationUrl: `${base}/authorize`,
    tokenUrl: `${base}/token`,
    userinfoUrl: `${base}/userinfo`,
    stop: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
};
