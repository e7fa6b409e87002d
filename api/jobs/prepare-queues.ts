import PgBoss from 'pg-boss';
import { queueNames } from './queue-names.ts';
import { queueOptions } from './queue-defaults.ts';

/** Makes the queue tables and the queues themselves, in the schema that the application role owns. Safe to repeat. */
export const prepareQueues = async (applicationUrl: string): Promise<void> => {
  const boss = new PgBoss({ connectionString: applicationUrl, max: 2, supervise: false, schedule: false, migrate: true });
  boss.on('error', () => undefined);
  await boss.start();
  try {
    for (const name of queueNames) {
      const options = { name, policy: 'standard' as const, ...queueOptions(name) };
      if (await boss.getQueue(name)) await boss.updateQueue(name, options);
      else await boss.createQueue(name, options);
    }
  } finally {
    await boss.stop({ graceful: false });
  }
};
