import { createHash } from 'node:crypto';
import { canonicalJson } from '#app/domain/canonical-json.ts';

export const sha256Hex = (bytes: Uint8Array | string): string => createHash('sha256').update(bytes).digest('hex');
export const hashOf = (value: unknown): string => sha256Hex(canonicalJson(value));
