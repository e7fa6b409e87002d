import pg from 'pg';
import { describe, expect, it } from 'vitest';
import { User } from '#api/entities/user.ts';
import { AuditEvent } from '#api/entities/audit-event.ts';
import { useTestDatabase } from '#tests/support/test-database.ts';

const database = useTestDatabase();

const as = async (url: string, sql: string): Promise<unknown> => {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    return (await client.query(sql)).rows;
  } finally {
    await client.end();
  }
};

const event = { at: new Date('2026-05-04T08:00:00Z'), action: 'test.event', actorKind: 'registry' as const, actorId: null, organisationId: null, subjectType: 'test', subjectId: 'T-1', requestId: null, detail: { a: 1 } };

describe('the base schema', () => {
  it('keeps a user and gives it back with its instants in UTC', async () => {
    const em = database().orm.em.fork();
    const at = new Date('2026-05-04T08:00:00.123Z');
    em.create(User, { subject: 's-1', email: 'ida@larkspur.example', name: 'Ida Marsh', createdAt: at, lastSignInAt: null, disabledAt: null });
    await em.flush();
    const found = await database().orm.em.fork().findOneOrFail(User, { email: 'ida@larkspur.example' });
    expect(found.createdAt.toISOString()).toBe('2026-05-04T08:00:00.123Z');
    expect(found.id).toMatch(/^[0-9a-f-]{36}$/);
  });

  it('refuses to change, remove or empty the audit trail, also for the owner and in replication mode', async () => {
    const em = database().orm.em.fork();
    em.create(AuditEvent, event);
    await em.flush();
    for (const sql of ["update audit_event set action = 'x'", 'delete from audit_event', 'truncate audit_event']) {
      await expect(as(database().ownerUrl, sql)).rejects.toMatchObject({ code: 'EB001' });
      await expect(as(database().url, sql)).rejects.toMatchObject({ code: '42501' });
    }
    expect(await as(database().ownerUrl, "select distinct tgenabled from pg_trigger where tgname like 'freeze_%'")).toEqual([{ tgenabled: 'A' }]);
  });

  it('lets the named columns of a partly frozen table change and no others', async () => {
    await as(database().url, "insert into mail_outbox values (gen_random_uuid(), 'a@b.example', 's', 'b', 't', 'i', now(), null, 0, null)");
    await as(database().url, "update mail_outbox set attempts = 1, last_error = 'busy'");
    await expect(as(database().url, "update mail_outbox set body = 'other'")).rejects.toMatchObject({ code: 'EB001' });
    await expect(as(database().url, 'delete from mail_outbox')).rejects.toMatchObject({ code: 'EB001' });
  });

  it('gives the application role no table of its own outside the queue', async () => {
    const rows = await as(database().url, "select tableowner, schemaname from pg_tables where schemaname in ('public', 'pgboss') group by 1, 2 order by 2");
    expect(rows).toEqual([{ tableowner: 'evenbeam_app', schemaname: 'pgboss' }, { tableowner: 'evenbeam_owner', schemaname: 'public' }]);
    await expect(as(database().url, 'create schema other')).rejects.toMatchObject({ code: '42501' });
    await expect(as(database().url, 'alter table audit_event disable trigger all')).rejects.toMatchObject({ code: '42501' });
  });
});
