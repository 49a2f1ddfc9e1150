import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { parseReconstructionInput } from './reconstruction-schema.ts';
import { fieldWords, rankOfPart } from './run-difference.ts';

/** The earlier input with one change of the later one. */
export interface AloneInput {
  /** "Mark, bearing" */
  readonly label: string;
  /** Null where the change makes no sense by itself; `refusal` says why. */
  readonly input: ReconstructionInput | null;
  readonly refusal: string | null;
}

/** More changes than these are not worked out one by one. */
export const mostAlone = 8;

type Plain = Record<string, unknown>;
const isPlain = (value: unknown): value is Plain => typeof value === 'object' && value !== null && !Array.isArray(value);

/** Paths at which two inputs differ; lists count as one value, and so does a part that only one of them has. */
function differingPaths(before: unknown, after: unknown, path: readonly string[] = []): (readonly string[])[] {
  if (!isPlain(before) || !isPlain(after)) return JSON.stringify(before) === JSON.stringify(after) ? [] : [path];
  return [...new Set([...Object.keys(before), ...Object.keys(after)])].flatMap((key) => differingPaths(before[key], after[key], [...path, key]));
}

function withPath(target: Plain, path: readonly string[], value: unknown): Plain {
  const [key = '', ...rest] = path;
  if (rest.length > 0) {
    const part = target[key];
    return { ...target, [key]: withPath(isPlain(part) ? part : {}, rest, value) };
  }
  const { [key]: _old, ...others } = target;
  return value === undefined ? others : { ...others, [key]: value };
}

const at = (source: unknown, path: readonly string[]): unknown => path.reduce<unknown>((value, key) => (isPlain(value) ? value[key] : undefined), source);
const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** One input for each change between two runs, or null where there are none, or too many to take one by one. */
export function aloneInputs(before: ReconstructionInput, after: ReconstructionInput): AloneInput[] | null {
  const paths = differingPaths(before, after).toSorted((a, b) => rankOfPart(a[0] ?? '') - rankOfPart(b[0] ?? ''));
  if (paths.length < 2 || paths.length > mostAlone) return null;
  return paths.map((path) => {
    const label = capital(path.map((part) => fieldWords(part).words).join(', '));
    const parsed = parseReconstructionInput(withPath({ ...before }, path, at(after, path)));
    return parsed.ok ? { label, input: parsed.input, refusal: null } : { label, input: null, refusal: parsed.problems[0]?.message ?? 'It does not go with the rest.' };
  });
}
