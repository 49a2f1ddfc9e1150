import rows from '#fixtures/reference/check-values.json';

interface CheckRow {
  readonly id: string;
  readonly expected: Record<string, unknown>;
  readonly tolerance: string;
  readonly source: string;
}

const table: readonly CheckRow[] = rows;

/** Row of the reference collection with its numbers and tolerances, for one test. */
export class Check {
  readonly #row: CheckRow;

  constructor(id: string) {
    const found = table.find((r) => r.id === id);
    if (!found) throw new Error(`the reference collection has no row ${id}`);
    this.#row = found;
  }

  /** Test name: row and source. */
  get name(): string {
    return `${this.#row.id}: ${this.#row.source}`;
  }

  number(key: string): number {
    const value = this.#row.expected[key];
    if (typeof value !== 'number') throw new Error(`${this.#row.id} has no number ${key}`);
    return value;
  }

  numbers(key: string): number[] {
    const value = this.#row.expected[key];
    if (!Array.isArray(value)) throw new Error(`${this.#row.id} has no list ${key}`);
    return value.map((v) => Number(v));
  }

  /**
   * Allowed distance from an expected value, read from the row's tolerance text ("T 0.003; plane 1 mm; C 4 %").
   * Lengths are returned in millimetres, as the rows give them.
   */
  tolerance(expected: number, label = ''): number {
    const part = this.#row.tolerance
      .split(';')
      .map((p) => p.trim())
      .find((p) => (label === '' ? /^[\d.]/.test(p) : p.startsWith(`${label} `)));
    const match = /([\d.]+(?:e-?\d+)?) ?(%|mm|deg)?/.exec((part ?? '').slice(label.length));
    if (!match) throw new Error(`${this.#row.id} states no tolerance for "${label}"`);
    const size = Number(match[1]);
    return match[2] === '%' ? (Math.abs(expected) * size) / 100 : size;
  }
}

/** Bounds round an expected value, for one message that shows all three numbers. */
export function outside(actual: number, expected: number, tolerance: number): string | null {
  return Math.abs(actual - expected) <= tolerance ? null : `${actual} is not within ${tolerance} of ${expected}`;
}

/** Half-angle of the sun and limb law that the traced rows fix. */
export const rowSun = { sunHalfAngleRad: (0.2665 * Math.PI) / 180, limbU: 0.56 } as const;
