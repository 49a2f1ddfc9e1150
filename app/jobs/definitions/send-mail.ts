import { z } from 'zod';
import { defineJob } from '../define-job.ts';

/** Wakes the sender; the messages themselves wait in the outbox, and a timer looks there as well. */
export const sendMailJob = defineJob({
  name: 'send-mail',
  payload: z.object({}),
  retryLimit: 1,
  expireInSeconds: 120,
});
