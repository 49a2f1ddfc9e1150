import { z } from 'zod';
import { defineJob } from '../define-job.ts';

export const preparePhotoJob = defineJob({
  name: 'prepare-photo',
  payload: z.object({ photoId: z.uuid() }),
  retryLimit: 5,
  expireInSeconds: 120,
});
