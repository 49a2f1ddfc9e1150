import { z } from 'zod';
import { defineJob } from '../define-job.ts';

export const runComputationJob = defineJob({
  name: 'run-computation',
  payload: z.object({ computationId: z.uuid() }),
  retryLimit: 2,
  expireInSeconds: 600,
});
