import { Readable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { describe, expect, test } from 'vitest';
import { BodyMeter, BodyTooLargeError, tooLargeSentence } from '#app/http/body-meter.server.ts';

function bodyOf(...sizes: number[]): Readable {
  return Readable.from(sizes.map((size) => Buffer.alloc(size, 'x')));
}

describe('BodyMeter', () => {
  test('passes a body of exactly the limit', async () => {
    const received = await buffer(bodyOf(40, 60).pipe(new BodyMeter(100)));
    expect(received.length).toBe(100);
  });

  test('fails at the first byte over the limit, although no length was declared', async () => {
    const meter = new BodyMeter(100);
    await expect(buffer(bodyOf(40, 60, 1).pipe(meter))).rejects.toBeInstanceOf(BodyTooLargeError);
    expect(meter.exceeded).toBe(true);
  });
});

test('the refusal names the limit in megabytes', () => {
  expect(tooLargeSentence(202_000_000)).toContain('202 MB');
});
