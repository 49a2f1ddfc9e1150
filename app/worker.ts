import { closeDatabase } from '#db/client.server.ts';
import { preparePhotoJob } from '#app/jobs/definitions/prepare-photo.ts';
import { runComputationJob } from '#app/jobs/definitions/run-computation.ts';
import { runReconstructionJob } from '#app/jobs/definitions/run-reconstruction.ts';
import { sendMailJob } from '#app/jobs/definitions/send-mail.ts';
import { sendDueReminders } from '#app/jobs/handlers/due-reminders.server.ts';
import { forgetExpired } from '#app/jobs/handlers/forget-expired.server.ts';
import { preparePhoto } from '#app/jobs/handlers/prepare-photo.server.ts';
import { runComputation } from '#app/jobs/handlers/run-computation.server.ts';
import { runReconstruction } from '#app/jobs/handlers/run-reconstruction.server.ts';
import { sendDueMail } from '#app/jobs/handlers/send-mail.server.ts';
import { handle, stopQueue } from '#app/jobs/queue.server.ts';
import { log } from '#app/log.server.ts';
import { purgeAbandonedPhotos } from '#app/services/photos/purge-abandoned-photos.server.ts';

/** The second process: jobs from the queue, and what has to be looked at from time to time. */
const second = 1_000;
const timers: NodeJS.Timeout[] = [];

/** Runs `work` now and then; a failure is logged and the next turn comes all the same. Turns never overlap. */
function every(intervalMs: number, name: string, work: () => Promise<unknown>): void {
  let busy = false;
  const turn = async () => {
    if (busy) return;
    busy = true;
    try {
      await work();
    } catch (error) {
      log.error({ err: error }, `${name} failed`);
    } finally {
      busy = false;
    }
  };
  timers.push(setInterval(() => void turn(), intervalMs));
  void turn();
}

await handle(runReconstructionJob, runReconstruction);
await handle(runComputationJob, runComputation);
await handle(preparePhotoJob, preparePhoto);
await handle(sendMailJob, async () => {
  await sendDueMail();
});
every(5 * second, 'sending mail', sendDueMail);
every(3_600 * second, 'reminders', sendDueReminders);
every(86_400 * second, 'removal of abandoned photos', purgeAbandonedPhotos);
every(86_400 * second, 'removal of what has run out', forgetExpired);
log.info('worker is ready');

let stopping = false;
async function stop(): Promise<void> {
  if (stopping) return;
  stopping = true;
  for (const timer of timers) clearInterval(timer);
  await stopQueue();
  await closeDatabase();
  process.exit(0);
}
process.on('SIGTERM', () => void stop());
process.on('SIGINT', () => void stop());
