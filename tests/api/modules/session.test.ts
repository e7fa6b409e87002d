import { describe, expect, it } from 'vitest';
import { addMember, makeContributor, makeCurator, makeOrganisation, makeToken, makeUser } from '#tests/support/people.ts';
import { asStranger, signInAs, withToken } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const test = useTestApp();
const em = () => test().deps.orm.em.fork();

describe('who is asking', () => {
  it('is nobody without a session, and says so without an error', async () => {
    const answer = await asStranger(test())('get', '/api/v1/me').expect(200);
    expect(answer.body).toEqual({ user: null, curator: false, steward: false, organisations: [], csrfToken: '' });
    expect(answer.headers['set-cookie']).toBeUndefined();
  });

  it('is the person with current roles and organisations; ended ones are left out', async () => {
    const fork = em();
    const { user, organisation } = await makeContributor(fork);
    const former = await makeOrganisation(fork);
    await addMember(fork, user, former, { until: new Date('2026-02-01T00:00:00Z') });
    const answer = await (await signInAs(test(), user))('get', '/api/v1/me').expect(200);
    expect(answer.body).toMatchObject({ user: { id: user.id, email: user.email }, curator: false, organisations: [{ id: organisation.id, role: 'contributor' }] });
    expect(answer.body.organisations).toHaveLength(1);
    expect(answer.headers['cache-control']).toBe('no-store');
  });

  it('knows a curator, and forgets a person whose account was closed', async () => {
    const fork = em();
    const curator = await makeCurator(fork);
    const ask = await signInAs(test(), curator);
    expect((await ask('get', '/api/v1/me')).body.curator).toBe(true);
    curator.disabledAt = new Date();
    await fork.flush();
    expect((await ask('get', '/api/v1/me')).body.user).toBeNull();
  });
});

describe('API tokens', () => {
  it('stand for their organisation; revoked, expired and malformed ones are refused with 401', async () => {
    const fork = em();
    const { user, organisation } = await makeContributor(fork);
    const good = await makeToken(fork, organisation, user);
    // The session route is not open to tokens; the refusal shows that the token was recognised.
    await withToken(test(), good)('get', '/api/v1/me').expect(403);
    const revoked = await makeToken(fork, organisation, user, { revokedAt: new Date() });
    const expired = await makeToken(fork, organisation, user, { expiresAt: new Date('2026-05-04T07:59:59Z') });
    for (const bad of [revoked, expired, 'evb_unknown_unknown_unknown', 'short']) {
      const answer = await withToken(test(), bad)('get', '/api/health').expect(401);
      expect(answer.headers['www-authenticate']).toContain('Bearer');
      expect(answer.body.code).toBe('not-signed-in');
    }
  });
});

describe('changes asked for by a session', () => {
  it('need the synchroniser token and, where an Origin is given, our own', async () => {
    const ask = await signInAs(test(), await makeUser(em()));
    for (const [header, value] of [['x-csrf-token', ''], ['x-csrf-token', 'x'.repeat(43)], ['origin', 'https://elsewhere.example']] as const) {
      const answer = await ask('post', '/auth/sign-out').set(header, value).expect(403);
      expect(answer.body).toMatchObject({ type: '/problems/origin-refused', status: 403, code: 'origin-refused' });
    }
    await ask('post', '/auth/sign-out').set('origin', test().deps.config.publicUrl).expect(204);
    expect((await ask('get', '/api/v1/me')).body.user).toBeNull();
  });

  it('sign-out everywhere ends all sessions of the person and no one else’s', async () => {
    const fork = em();
    const [user, other] = [await makeUser(fork), await makeUser(fork)];
    const [here, there, else_] = [await signInAs(test(), user), await signInAs(test(), user), await signInAs(test(), other)];
    await here('post', '/auth/sign-out-everywhere').expect(204);
    expect((await there('get', '/api/v1/me')).body.user).toBeNull();
    expect((await else_('get', '/api/v1/me')).body.user.id).toBe(other.id);
  });

  it('are refused to strangers before anything else is looked at', async () => {
    await asStranger(test())('post', '/auth/sign-out').expect(401);
  });
});
