/** Differences between two frozen inputs, leaf by leaf, whatever fields the engine's input has or gains. */

type Leaf = string | number | boolean;

export interface InputDifference {
  /** "Mark" */
  readonly group: string;
  /** "bearing, ±" */
  readonly field: string;
  readonly unit: string;
  readonly before: string;
  readonly after: string;
  /** After less before, with its sign; bearings by the shorter way round. Null where one is not a number. */
  readonly difference: string | null;
}

export interface InputComparison {
  readonly changed: readonly InputDifference[];
  /** How many leaves are equal in both. */
  readonly same: number;
}

/** Endings of field names that state a unit, longest first. */
const units: readonly (readonly [ending: string, unit: string])[] = [['Kwm2', 'kW/m²'], ['Wm2', 'W/m²'], ['PerM', '1/m'], ['Mrad', 'mrad'], ['Hpa', 'hPa'], ['Deg', '°'], ['Km', 'km'], ['Mm', 'mm'], ['Cm', 'cm'], ['Utc', 'UTC'], ['M', 'm'], ['S', 's'], ['C', '°C']];

const spaced = (name: string): string => name.replaceAll(/([a-z0-9])([A-Z])/gu, '$1 $2').toLowerCase();

/** "bearingSigmaDeg" is "bearing, ±" in degrees. */
export function fieldWords(name: string): { readonly words: string; readonly unit: string } {
  const ending = units.find(([end]) => name.length > end.length && name.endsWith(end) && /[a-z0-9]/u.test(name.at(-end.length - 1) ?? ''));
  const bare = ending ? name.slice(0, -ending[0].length) : name;
  const spread = /^(.*)(?:Sigma|sigma)(Rel)?$/u.exec(bare);
  if (spread) {
    const of = spaced(spread[1] ?? '');
    return { words: of === '' ? '± (one sigma)' : `${of}, ± (one sigma)`, unit: spread[2] ? 'of the value' : (ending?.[1] ?? '') };
  }
  return { words: spaced(bare), unit: ending?.[1] ?? '' };
}

function leavesOf(value: unknown, path: readonly string[], into: Map<string, { readonly path: readonly string[]; readonly leaf: Leaf }>): void {
  if (value === null || value === undefined) return;
  if (typeof value === 'object') {
    for (const [key, part] of Object.entries(value)) leavesOf(part, [...path, key], into);
    return;
  }
  if (typeof value === 'string' || typeof value === 'number' || typeof value === 'boolean') into.set(path.join('.'), { path, leaf: value });
}

function leaves(value: unknown): Map<string, { readonly path: readonly string[]; readonly leaf: Leaf }> {
  const found = new Map<string, { readonly path: readonly string[]; readonly leaf: Leaf }>();
  leavesOf(value, [], found);
  return found;
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
const isPlace = (part: string): boolean => /^\d+$/u.test(part);

/** Group and field of a path: ["skyline", "points", "2", "elevationDeg"] is Skyline, "points 3, elevation". */
function named(path: readonly string[]): { readonly group: string; readonly field: string; readonly unit: string } {
  const [first = '', ...rest] = path;
  const { words, unit } = fieldWords(path.at(-1) ?? '');
  if (rest.length === 0) return { group: 'Run', field: words, unit };
  const within = rest.slice(0, -1).map((part) => (isPlace(part) ? String(Number(part) + 1) : spaced(part))).join(' ');
  const last = isPlace(path.at(-1) ?? '') ? String(Number(path.at(-1)) + 1) : words;
  return { group: capital(spaced(first)), field: [within, last].filter(Boolean).join(', '), unit };
}

const shown = (leaf: Leaf | undefined): string => (leaf === undefined ? 'not given' : typeof leaf === 'number' ? String(Number(leaf.toPrecision(7))) : String(leaf));
const turns = /azimuth|bearing|heading/iu;

function differenceOf(name: string, before: Leaf | undefined, after: Leaf | undefined): string | null {
  if (typeof before !== 'number' || typeof after !== 'number') return null;
  const raw = after - before;
  const value = turns.test(name) && name.endsWith('Deg') && !/sigma/iu.test(name) ? ((((raw + 180) % 360) + 360) % 360) - 180 : raw;
  const text = String(Number(Math.abs(value).toPrecision(4)));
  return `${value < 0 ? '−' : '+'}${text}`;
}

/** Parts of the input in the order of the light; a stored input does not keep the order in which it was written. */
const parts: readonly string[] = ['place', 'window', 'optic', 'opticSigmaRel', 'opening', 'occluders', 'mark', 'markCoordinates', 'target', 'skyline', 'sky'];

/** Place of a part in that order; parts without one come last. */
export const rankOfPart = (part: string): number => (parts.includes(part) ? parts.indexOf(part) : parts.length);

/** What differs between the inputs of two runs, in the order of the light; what is equal is only counted. */
export function compareInputs(before: unknown, after: unknown): InputComparison {
  const [earlier, later] = [leaves(before), leaves(after)];
  const keys = [...new Set([...later.keys(), ...earlier.keys()])].toSorted((a, b) => rankOfPart(a.split('.')[0] ?? '') - rankOfPart(b.split('.')[0] ?? ''));
  let same = 0;
  const changed = keys.flatMap((key): InputDifference[] => {
    const [from, to] = [earlier.get(key), later.get(key)];
    if (from?.leaf === to?.leaf) {
      same += 1;
      return [];
    }
    const path = (to ?? from)?.path ?? [];
    return [{ ...named(path), before: shown(from?.leaf), after: shown(to?.leaf), difference: differenceOf(path.at(-1) ?? '', from?.leaf, to?.leaf) }];
  });
  return { changed, same };
}
