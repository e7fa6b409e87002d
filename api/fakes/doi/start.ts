import { createServer } from 'node:http';
import express, { type Response } from 'express';
import { trialPrefix } from '#shared/citation/record.ts';
import { KeptDois, missingFrom, type Received } from './agency.ts';

export interface DoiStandIn {
  url: string;
  prefix: string;
  user: string;
  password: string;
  /** The file with everything it was told. */
  file: string;
  registered(): Received[];
  /** Fails so many requests with a status; with `after` it keeps what it is told and fails all the same. */
  failNext(times: number, status: number, after?: boolean): void;
  stop(): Promise<void>;
}

/** An agency on loopback that speaks the DOI part of DataCite's REST interface. Its DOIs resolve nowhere, by their prefix. */
export const startDoiStandIn = async (folder: string, password: string, port = 0): Promise<DoiStandIn> => {
  const dois = new KeptDois(folder);
  const user = 'EVENBEAM.LOCAL';
  const expected = `Basic ${Buffer.from(`${user}:${password}`).toString('base64')}`;
  let failing = { times: 0, status: 500, after: false };
  const app = express();
  app.disable('x-powered-by');
  const refuse = (response: Response, status: number, source: string, title: string): void => void response.status(status).type('application/vnd.api+json').send(JSON.stringify({ errors: [{ source, title, status: String(status) }] }));
  const answer = (response: Response, status: number, found: Received): void => void response.status(status).type('application/vnd.api+json').send(JSON.stringify({ data: { id: found.doi, type: 'dois', attributes: { ...found.attributes, state: found.event === 'publish' ? 'findable' : 'registered' } } }));

  app.use((request, response, next) => {
    if (request.get('authorization') !== expected) return refuse(response, 401, 'authorization', 'Bad credentials.');
    if (failing.times > 0 && !failing.after) {
      failing.times -= 1;
      return refuse(response, failing.status, 'agency', 'told to fail');
    }
    next();
  });
  app.use(express.json({ type: () => true, limit: '1mb' }));
  const keep = (response: Response, method: string, doi: string, attributes: Record<string, unknown>, status: number): void => {
    if (!/^10\.5072\/[a-z0-9.-]+$/.test(doi)) return refuse(response, 403, 'doi', `${doi} is not under ${trialPrefix}`);
    const [missing] = missingFrom(attributes);
    if (missing) return refuse(response, 422, missing.source, missing.title);
    const received = { at: new Date().toISOString(), method, doi, event: String(attributes.event ?? ''), attributes };
    dois.keep(received);
    if (failing.times > 0) {
      failing.times -= 1;
      return refuse(response, failing.status, 'agency', 'told to fail');
    }
    answer(response, status, received);
  };
  const attributesOf = (body: unknown): Record<string, unknown> => (body as { data?: { attributes?: Record<string, unknown> } } | undefined)?.data?.attributes ?? {};
  app.post('/dois', (request, response) => {
    const attributes = attributesOf(request.body);
    const doi = String(attributes.doi ?? '').toLowerCase();
    if (dois.get(doi)) return refuse(response, 422, 'doi', 'This DOI has already been taken');
    keep(response, 'POST', doi, attributes, 201);
  });
  app.put('/dois/:prefix/:suffix', (request, response) => {
    const doi = `${request.params.prefix}/${request.params.suffix}`.toLowerCase();
    if (!dois.get(doi)) return refuse(response, 404, 'doi', 'The resource you are looking for does not exist.');
    keep(response, 'PUT', doi, attributesOf(request.body), 200);
  });
  app.get('/dois/:prefix/:suffix', (request, response) => {
    const found = dois.get(`${request.params.prefix}/${request.params.suffix}`.toLowerCase());
    if (!found) return refuse(response, 404, 'doi', 'The resource you are looking for does not exist.');
    answer(response, 200, found);
  });

  const server = createServer(app);
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  const address = server.address();
  return {
    url: `http://127.0.0.1:${typeof address === 'object' && address ? address.port : port}`,
    prefix: trialPrefix, user, password, file: dois.file,
    registered: () => dois.all(),
    failNext: (times, status, after = false) => { failing = { times, status, after }; },
    stop: () => new Promise((resolve) => {
      server.close(() => resolve());
      server.closeAllConnections();
    }),
  };
};
