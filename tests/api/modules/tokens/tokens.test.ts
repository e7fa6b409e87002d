import { beforeAll, describe, expect, it } from 'vitest';
import { tokenCreated } from '#shared/contracts/session.ts';
import { makeDesk, type Desk } from '#tests/support/record.ts';
import { asStranger, withToken } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
let desk: Desk;
let other: Desk;
beforeAll(async () => {
  desk = await makeDesk(app());
  other = await makeDesk(app());
});

describe('API tokens', () => {
  it('tell their secret once, keep only its hash, open the organisation’s reads, and end when revoked', async () => {
    const made = tokenCreated.parse((await desk.client('post', '/api/v1/tokens').send({ name: 'nightly', organisation: desk.organisation.id })).body);
    const { rows } = await app().deps.pool.query('select * from api_token where id = $1', [made.id]);
    expect(JSON.stringify(rows)).not.toContain(made.secret);
    expect(made.secret.startsWith(made.hint)).toBe(true);
    const script = withToken(app(), made.secret);
    expect((await script('get', '/api/v1/submissions')).status).toBe(200);
    const list = await desk.client('get', `/api/v1/tokens?organisation=${desk.organisation.id}`);
    expect(list.body).toMatchObject({ items: [{ id: made.id, name: 'nightly', createdBy: desk.contributor.name, lastUsedAt: expect.any(String) as string }] });
    expect(JSON.stringify(list.body)).not.toContain(made.secret);
    expect((await desk.client('delete', `/api/v1/tokens/${made.id}`)).status).toBe(204);
    expect((await script('get', '/api/v1/submissions')).status).toBe(401);
    expect((await desk.client('delete', `/api/v1/tokens/${made.id}`)).status).toBe(404);
  });

  it('do not make, list or revoke tokens, nor devices, and are the organisation’s own', async () => {
    const made = tokenCreated.parse((await desk.client('post', '/api/v1/tokens').send({ name: 'script', organisation: desk.organisation.id })).body);
    const script = withToken(app(), made.secret);
    expect((await script('post', '/api/v1/tokens').send({ name: 'x', organisation: desk.organisation.id })).status).toBe(403);
    expect((await script('get', `/api/v1/tokens?organisation=${desk.organisation.id}`)).status).toBe(403);
    expect((await script('post', '/api/v1/devices').send({ organisation: desk.organisation.id, name: 'X-1', modality: 'spin' })).status).toBe(403);
    expect((await other.client('delete', `/api/v1/tokens/${made.id}`)).status).toBe(403);
    expect((await other.client('get', `/api/v1/tokens?organisation=${desk.organisation.id}`)).status).toBe(403);
    expect((await asStranger(app())('post', '/api/v1/tokens').send({ name: 'x', organisation: desk.organisation.id })).status).toBe(401);
  });
});

describe('devices', () => {
  it('are registered under an address made of provider and name, once', async () => {
    const made = await desk.client('post', '/api/v1/devices').send({ organisation: desk.organisation.id, name: 'Größe 7 (left)', modality: 'photonic' });
    expect([made.status, made.body]).toEqual([201, { id: `${desk.organisation.slug}-gro-e-7-left`, name: 'Größe 7 (left)', modality: 'photonic', provider: { id: desk.organisation.slug, name: desk.organisation.name }, entries: 0, lastEntryAt: null, demo: false }]);
    for (const name of ['Größe 7 (left)', 'gro e 7 LEFT']) expect((await desk.client('post', '/api/v1/devices').send({ organisation: desk.organisation.id, name, modality: 'spin' })).body, name).toMatchObject({ status: 409, code: 'already-exists' });
    expect((await desk.client('post', '/api/v1/devices').send({ organisation: desk.organisation.id, name: '——', modality: 'spin' })).body).toMatchObject({ status: 400, errors: [{ pointer: '/name' }] });
    expect((await other.client('post', '/api/v1/devices').send({ organisation: desk.organisation.id, name: 'Y-1', modality: 'spin' })).status).toBe(403);
    const list = (await desk.client('get', `/api/v1/organisations/${desk.organisation.slug}/devices`)).body as { items: { id: string }[] };
    expect(list.items.map((d) => d.id)).toContain(`${desk.organisation.slug}-gro-e-7-left`);
    expect((await other.client('get', `/api/v1/organisations/${desk.organisation.slug}/devices`)).status).toBe(403);
    expect((await asStranger(app())('get', '/api/v1/devices')).body).toEqual({ items: [], nextCursor: null });
    expect((await asStranger(app())('get', `/api/v1/devices/${desk.device.id}`)).body).toMatchObject({ name: desk.device.name, entries: 0, history: [] });
    expect((await asStranger(app())('get', '/api/v1/devices/nothing')).status).toBe(404);
  });
});
