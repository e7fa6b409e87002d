import type { EntityManager } from '@mikro-orm/postgresql';
import { Organisation } from '#api/entities/organisation.ts';
import { User } from '#api/entities/user.ts';
import { authorise } from '#api/lib/authorise.ts';
import type { Clock } from '#api/lib/clock.ts';
import type { LogKey } from '#api/lib/log-key.ts';
import type { Work } from '#api/lib/work.ts';
import { callerOf } from '#api/middleware/find-caller.ts';
import type { Queue } from '#api/jobs/queue.ts';
import type { RunInThread } from '#api/jobs/threads.ts';
import type { SheetOutcome } from '#api/demo/foresight/work.ts';
import type { Action, Thing } from '#shared/domain/rules.ts';

/** What came of a story so far. */
export interface Record {
  submission?: string;
  accession?: string;
  runSheet?: string;
}

/** The moment in which an act is done. */
export interface Moment {
  em: EntityManager;
  clock: Clock;
  queue: Queue;
  runInThread: RunInThread;
  logKey: LogKey;
  /** By key of the story. */
  records: Map<string, Record>;
  outcomes: ReadonlyMap<string, SheetOutcome>;
}

/** The registry's own work. */
export const asRegistry = ({ em, clock, queue, runInThread, logKey }: Moment): Work => ({ em, clock, queue, runInThread, logKey, caller: null });

/** The work of an invented person with the roles held at that moment; refused like anyone's where the rules refuse it. */
export const asPerson = async (moment: Moment, subject: string, action: Action, thing: Thing): Promise<Work> => {
  const user = await moment.em.findOneOrFail(User, { subject });
  const caller = await callerOf(moment.em, user.id, moment.clock.now(), '');
  if (!caller) throw new Error(`${user.name} cannot sign in.`);
  authorise(action, caller, thing);
  return { ...asRegistry(moment), caller };
};

export const organisationNamed = (moment: Moment, slug: string): Promise<Organisation> => moment.em.findOneOrFail(Organisation, { slug });
