import express, { type Application, type Response } from 'express';
import helmet from 'helmet';
import { z } from 'zod';
import { inventedPeople, type InventedPerson } from '../people.ts';
import { challengeOf, Grants } from './grants.ts';
import { chooserPage, faultPage, styleSheet } from './page.ts';

export interface StandInOptions {
  clientId: string;
  clientSecret: string;
  /** The one address that codes are sent to. */
  redirectUri: string;
}

interface Code {
  person: InventedPerson;
  challenge: string;
}

const authorisation = z.object({
  response_type: z.literal('code'),
  client_id: z.string(),
  redirect_uri: z.string(),
  scope: z.string(),
  state: z.string().min(1),
  code_challenge: z.string().min(43),
  code_challenge_method: z.literal('S256'),
});
const exchange = z.object({ grant_type: z.literal('authorization_code'), code: z.string(), redirect_uri: z.string(), client_id: z.string(), client_secret: z.string(), code_verifier: z.string() });

/** Speaks the part of the sign-in service's protocol that the registry uses: code with state and PKCE, token, userinfo. */
export const createStandIn = (options: StandInOptions): Application => {
  const codes = new Grants<Code>(60_000);
  const accesses = new Grants<InventedPerson>(600_000);
  const app = express();
  app.disable('x-powered-by');
  const page = (response: Response, html: string, status = 200): void => void response.status(status).set('cache-control', 'no-store').type('html').send(html);
  app.use(helmet({ contentSecurityPolicy: { useDefaults: false, directives: { defaultSrc: ["'none'"], styleSrc: ["'self'"], frameAncestors: ["'none'"], baseUri: ["'none'"] } }, strictTransportSecurity: false }));
  app.use(express.urlencoded({ extended: false, limit: '16kb' }));

  const readRequest = (source: unknown): z.infer<typeof authorisation> | string => {
    const parsed = authorisation.safeParse(source);
    if (!parsed.success) return `The request lacks or misstates: ${parsed.error.issues.map((issue) => issue.path.join('.')).join(', ')}.`;
    if (parsed.data.client_id !== options.clientId) return `The client "${parsed.data.client_id}" is not known here.`;
    if (parsed.data.redirect_uri !== options.redirectUri) return `Codes go to ${options.redirectUri} only, not to ${parsed.data.redirect_uri}.`;
    return parsed.data;
  };
  const back = (state: string, more: Record<string, string>): string => `${options.redirectUri}?${new URLSearchParams({ state, ...more }).toString()}`;

  app.get('/style.css', (_request, response) => void response.type('css').send(styleSheet));
  app.get('/authorize', (request, response) => {
    const wanted = readRequest(request.query);
    if (typeof wanted === 'string') return page(response, faultPage(wanted), 400);
    page(response, chooserPage(inventedPeople, wanted, back(wanted.state, { error: 'access_denied' })));
  });
  app.post('/authorize', (request, response) => {
    const wanted = readRequest(request.body);
    if (typeof wanted === 'string') return page(response, faultPage(wanted), 400);
    const person = inventedPeople.find(({ subject }) => subject === (request.body as { subject?: unknown }).subject);
    if (!person) return page(response, faultPage('Nobody of that name is invented here.'), 400);
    response.redirect(303, back(wanted.state, { code: codes.give({ person, challenge: wanted.code_challenge }) }));
  });
  app.post('/token', (request, response) => {
    const asked = exchange.safeParse(request.body);
    const refuse = (error: string): void => void response.status(400).json({ error });
    if (!asked.success) return refuse('invalid_request');
    if (asked.data.client_id !== options.clientId || asked.data.client_secret !== options.clientSecret) return refuse('invalid_client');
    const code = codes.take(asked.data.code);
    if (!code || asked.data.redirect_uri !== options.redirectUri || challengeOf(asked.data.code_verifier) !== code.challenge) return refuse('invalid_grant');
    response.set('cache-control', 'no-store').json({ access_token: accesses.give(code.person), token_type: 'Bearer', expires_in: 600, scope: 'openid email profile' });
  });
  app.get('/userinfo', (request, response) => {
    const bearer = /^Bearer (.+)$/i.exec(request.get('authorization') ?? '')?.[1] ?? String(request.query.access_token ?? '');
    const person = accesses.look(bearer);
    if (!person) return void response.status(401).json({ error: 'invalid_token' });
    response.json({ sub: person.subject, name: person.name, email: person.email, email_verified: true });
  });
  return app;
};
