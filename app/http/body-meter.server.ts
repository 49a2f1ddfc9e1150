import { Transform } from 'node:stream';
import type { TransformCallback } from 'node:stream';

/** The request's body was longer than this server reads. */
export class BodyTooLargeError extends Error {
  readonly limitBytes: number;

  constructor(limitBytes: number) {
    super(`The request's body is longer than ${limitBytes} bytes.`);
    this.name = 'BodyTooLargeError';
    this.limitBytes = limitBytes;
  }
}

/** Passes a body through and fails at the first byte over the limit, whatever length was declared. */
export class BodyMeter extends Transform {
  readonly limitBytes: number;
  #bytes = 0;

  constructor(limitBytes: number) {
    super();
    this.limitBytes = limitBytes;
  }

  get exceeded(): boolean {
    return this.#bytes > this.limitBytes;
  }

  override _transform(chunk: Buffer, _encoding: BufferEncoding, done: TransformCallback): void {
    this.#bytes += chunk.length;
    if (this.exceeded) done(new BodyTooLargeError(this.limitBytes));
    else done(null, chunk);
  }
}

/** What a person reads who sent too much. */
export function tooLargeSentence(limitBytes: number): string {
  const limitMb = Math.floor(limitBytes / 1_000_000);
  return `This is more than the ${limitMb} MB that can be sent at once: go back, remove some photographs, and add the rest afterwards. Nothing of this attempt was stored.`;
}
