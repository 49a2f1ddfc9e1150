import { data } from 'react-router';
import { DomainError } from '#app/domain/errors.ts';
import type { DomainErrorCode } from '#app/domain/errors.ts';

const statusOf: Record<DomainErrorCode, number> = {
  'not-found': 404,
  forbidden: 403,
  'invalid-state': 409,
  conflict: 409,
  'invalid-input': 400,
  'too-many': 429,
};

/** What every error boundary can rely on. */
export interface ErrorPayload {
  readonly code: DomainErrorCode | 'unexpected';
  readonly message: string;
  readonly needs: readonly string[];
}

/** Turns an expected refusal into a thrown response; anything else is thrown on as it is. */
export function throwAsResponse(error: unknown): never {
  if (error instanceof DomainError) {
    const payload: ErrorPayload = { code: error.code, message: error.message, needs: error.needs };
    throw data(payload, { status: statusOf[error.code] });
  }
  throw error;
}

/** Runs a loader or action body, turning expected refusals into responses. */
export async function respond<Result>(work: () => Promise<Result>): Promise<Result> {
  try {
    return await work();
  } catch (error) {
    return throwAsResponse(error);
  }
}

export const statusFor = (error: DomainError): number => statusOf[error.code];
