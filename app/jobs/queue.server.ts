import PgBoss from 'pg-boss';
import type { z } from 'zod';
import type { Transaction } from '#db/client.server.ts';
import { executeInTransaction } from '#db/raw-sql.server.ts';
import { env } from '#app/env.server.ts';
import { log } from '#app/log.server.ts';
import type { JobDefinition } from './define-job.ts';
import { preparePhotoJob } from './definitions/prepare-photo.ts';
import { runComputationJob } from './definitions/run-computation.ts';
import { runReconstructionJob } from './definitions/run-reconstruction.ts';
import { sendMailJob } from './definitions/send-mail.ts';

const definitions = [runReconstructionJob, runComputationJob, preparePhotoJob, sendMailJob] as const;

let starting: Promise<PgBoss> | undefined;

/** The queue lives in the same PostgreSQL database, so that a job is enqueued in the transaction that needs it. */
export function queue(): Promise<PgBoss> {
  starting ??= startQueue();
  return starting;
}

async function startQueue(): Promise<PgBoss> {
  const boss = new PgBoss({ connectionString: env.DATABASE_URL, max: 4 });
  boss.on('error', (error) => log.error({ err: error }, 'the queue reports an error'));
  await boss.start();
  for (const definition of definitions) await boss.createQueue(definition.name);
  return boss;
}

export async function stopQueue(): Promise<void> {
  if (!starting) return;
  const boss = await starting;
  starting = undefined;
  await boss.stop({ graceful: true, timeout: 10_000 });
}

/** Adds a job within the caller's transaction: no change without its job, no job without its change. */
export async function enqueue<Payload extends z.ZodType>(
  tx: Transaction,
  definition: JobDefinition<Payload>,
  payload: z.input<Payload>,
  options: { singletonKey?: string } = {},
): Promise<void> {
  const boss = await queue();
  const data = definition.payload.parse(payload);
  await boss.send(definition.name, Object(data), {
    ...options,
    retryLimit: definition.retryLimit,
    retryBackoff: true,
    expireInSeconds: definition.expireInSeconds,
    db: { executeSql: (text, values) => executeInTransaction(tx, text, values ?? []) },
  });
}

/** Registers the handler of a job in this process; one job at a time, failed jobs are retried with back-off. */
export async function handle<Payload extends z.ZodType>(
  definition: JobDefinition<Payload>,
  handler: (payload: z.output<Payload>) => Promise<void>,
): Promise<void> {
  const boss = await queue();
  await boss.work(definition.name, { batchSize: 1, pollingIntervalSeconds: 0.5 }, async (jobs) => {
    for (const job of jobs) await handler(definition.payload.parse(job.data));
  });
}
