import type { z } from 'zod';

/** A job: its queue, what its payload must be (ids only; the handler reads the rest anew), and how often it is retried. */
export interface JobDefinition<Payload extends z.ZodType> {
  readonly name: string;
  readonly payload: Payload;
  readonly retryLimit: number;
  readonly expireInSeconds: number;
}

export function defineJob<Payload extends z.ZodType>(definition: JobDefinition<Payload>): JobDefinition<Payload> {
  return definition;
}
