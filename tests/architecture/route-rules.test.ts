import { beforeAll, describe, expect, it } from 'vitest';
import type { Route } from '#api/lib/define-route.ts';
import { routes } from '#api/routes.ts';
import { submissionStates, type SubmissionState } from '#shared/domain/life-cycle.ts';
import { rules, type Rule, type Standing } from '#shared/domain/rules.ts';
import { addMember, grantRole, makeContributor, makeCurator, makeOrganisation, makeSteward, makeToken, makeUser } from '#tests/support/people.ts';
import { asStranger, signInAs, withToken, type Client } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const states: readonly SubmissionState[] = submissionStates;
let owner = '';
let state: SubmissionState = 'ready';

/** Every real route with its rule and its wiring, around a thing that the test chooses and a handler that does nothing. */
const hollow = routes.map((route): Route => ({
  method: route.method, path: route.path, action: route.action, summary: route.summary, limit: route.limit, status: 204,
  load: async () => ({ thing: { owner, state } }),
  handler: async () => undefined,
}));
const real = useTestApp();
const test = useTestApp({ routes: hollow });

const address = ({ path }: Route): string => path.replace(/:\w+/g, '1');
const name = ({ method, path }: Route): string => `${method.toUpperCase()} ${path}`;

interface Role {
  client: Client;
  /** Standings held towards the thing, read off product roles by hand: the oracle of this test. */
  standings: Standing[];
  token?: boolean;
}
const roles: Record<string, Role> = {};

beforeAll(async () => {
  const em = test().deps.orm.em.fork();
  const home = await makeOrganisation(em);
  const other = await makeOrganisation(em);
  owner = home.id;
  const person = async (user: { id: string }): Promise<Client> => signInAs(test(), user);
  const contributor = (await makeContributor(em, home)).user;
  const viewer = await makeUser(em);
  await addMember(em, viewer, home, { role: 'viewer' });
  const formerly = await makeUser(em);
  await addMember(em, formerly, home, { until: new Date('2026-01-31T00:00:00Z') });
  const curator = async (until?: Date | null): Promise<{ id: string }> => {
    const user = await makeCurator(em);
    if (until !== undefined) await addMember(em, user, home, { role: 'member', until });
    return user;
  };
  const both = (await makeContributor(em, home)).user;
  await grantRole(em, both, 'steward');
  const signedIn: Standing[] = ['anyone', 'member'];
  Object.assign(roles, {
    stranger: { client: asStranger(test()), standings: ['anyone'] },
    member: { client: await person(await makeUser(em)), standings: signedIn },
    'contributor of the owner': { client: await person(contributor), standings: [...signedIn, 'contributor'] },
    'contributor of another organisation': { client: await person((await makeContributor(em, other)).user), standings: signedIn },
    'viewer in the owner': { client: await person(viewer), standings: signedIn },
    'former contributor of the owner': { client: await person(formerly), standings: signedIn },
    'curator without interest': { client: await person(await curator()), standings: [...signedIn, 'curator'] },
    'curator of the owner': { client: await person(await curator(null)), standings: signedIn },
    'curator who left the owner 11 months ago': { client: await person(await curator(new Date('2025-06-04T08:00:00Z'))), standings: signedIn },
    'curator who left the owner 13 months ago': { client: await person(await curator(new Date('2025-04-04T08:00:00Z'))), standings: [...signedIn, 'curator'] },
    steward: { client: await person(await makeSteward(em)), standings: [...signedIn, 'steward'] },
    'steward and contributor': { client: await person(both), standings: [...signedIn, 'contributor', 'steward'] },
    'token of the owner': { client: withToken(test(), await makeToken(em, home, contributor)), standings: ['anyone', 'contributor'], token: true },
    'token of another organisation': { client: withToken(test(), await makeToken(em, other, contributor)), standings: ['anyone'], token: true },
  } satisfies Record<string, Role>);
});

const expected = (rule: Rule, role: Role, at: SubmissionState): number => {
  const counts = (standing: Standing): boolean => standing !== 'curator' || !rule.curatorStates || rule.curatorStates.includes(at);
  const open = rule.standings.some((standing) => role.standings.includes(standing) && counts(standing)) && (!role.token || rule.token === true);
  if (!open) return role === roles.stranger ? 401 : 403;
  return rule.states && !rule.states.includes(at) ? 409 : 204;
};

describe('every route', () => {
  it('has an action of the rule table', () => {
    expect(routes.filter((route) => !(route.action in rules)).map(name)).toEqual([]);
  });

  it('is listed once, and lies under /api or /auth', () => {
    expect(new Set(routes.map(name)).size).toBe(routes.length);
    expect(routes.filter(({ path }) => !/^\/(api|auth)\//.test(path)).map(name)).toEqual([]);
  });

  it('that speaks of one thing with an owner loads it before it is judged', () => {
    const careless = routes.filter(({ path, action, load }) => {
      const { standings }: Rule = rules[action];
      return path.includes('/:') && !standings.includes('anyone') && standings.some((s) => s === 'contributor' || s === 'curator') && !load;
    });
    expect(careless.map(name)).toEqual([]);
  });

  it('with a stated rule on states has a thing with a state to judge', () => {
    expect(routes.filter(({ action, load }) => (rules[action] as Rule).states && !load).map(name)).toEqual([]);
  });

  it.each(routes.map((route) => [name(route), route] as const))('%s answers every role in every state as the rule table says', async (_name, route) => {
    const rule: Rule = rules[route.action];
    for (const [title, role] of Object.entries(roles)) {
      // Whoever stays outside, and everyone where a rule names no states, gets the same answer in all of them.
      const stated = rule.states !== undefined || rule.curatorStates !== undefined;
      const opens = stated && states.some((at) => expected(rule, role, at) === 204);
      for (const at of opens ? states : (['ready', 'frozen'] as const)) {
        state = at;
        const answer = await role.client(route.method, address(route));
        // Sign-out ends the session it was asked with; what matters here is the door, and the handler is hollow.
        expect([title, at, answer.status]).toEqual([title, at, expected(rule, role, at)]);
      }
    }
  });

  it('with its real handler turns a stranger away before looking at the request', async () => {
    for (const route of routes.filter(({ action }) => !(rules[action] as Rule).standings.includes('anyone'))) {
      const answer = await asStranger(real())(route.method, address(route));
      expect([name(route), answer.status, answer.body.code]).toEqual([name(route), 401, 'not-signed-in']);
    }
  });
});
