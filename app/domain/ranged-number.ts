import { z } from 'zod';
import type { InputRange } from '#app/physics/input-ranges.ts';

/** A number within the engine's own range, so that contract and engine refuse the same. */
export const numberIn = ({ low, high, whole }: InputRange): z.ZodNumber => (whole ? z.int() : z.number()).min(low).max(high);
