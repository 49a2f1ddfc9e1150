import { z } from 'zod';
import { defineJob } from '../define-job.ts';

export const runReconstructionJob = defineJob({
  name: 'run-reconstruction',
  payload: z.object({ reconstructionId: z.uuid() }),
  retryLimit: 2,
  expireInSeconds: 600,
});
