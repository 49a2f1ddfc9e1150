export const domainErrorCodes = ['not-found', 'forbidden', 'invalid-state', 'conflict', 'invalid-input', 'too-many'] as const;
export type DomainErrorCode = (typeof domainErrorCodes)[number];

/**
 * An expected refusal. `message` is a sentence for the person who asked; `needs` lists what is missing for a move,
 * one sentence each; `fieldErrors` names the form field beside which its sentence belongs.
 */
export class DomainError extends Error {
  readonly code: DomainErrorCode;
  readonly needs: readonly string[];
  readonly fieldErrors: Readonly<Record<string, readonly string[]>>;

  constructor(
    code: DomainErrorCode,
    message: string,
    detail: { needs?: readonly string[]; fieldErrors?: Readonly<Record<string, readonly string[]>> } = {},
  ) {
    super(message);
    this.name = 'DomainError';
    this.code = code;
    this.needs = detail.needs ?? [];
    this.fieldErrors = detail.fieldErrors ?? {};
  }
}

export const notFound = (what: string) => new DomainError('not-found', `${what} was not found, or is not yours to see.`);
