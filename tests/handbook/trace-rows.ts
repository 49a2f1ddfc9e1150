import { z } from 'zod';
import { checkRow } from './check-row.ts';

const anything = z.record(z.string(), z.unknown());

/** Row of the reference collection with its numbers and tolerances, for one test. */
export class Check {
  readonly #id: string;
  readonly #expected: Record<string, unknown>;
  readonly #tolerance: string;
  /** Test name: row and source. */
  readonly name: string;

  constructor(id: string) {
    const row = checkRow(id, anything, anything);
    this.#id = id;
    this.#expected = row.expected;
    this.#tolerance = row.tolerance;
    this.name = row.name;
  }

  number(key: string): number {
    const value = this.#expected[key];
    if (typeof value !== 'number') throw new Error(`${this.#id} has no number ${key}`);
    return value;
  }

  numbers(key: string): number[] {
    const value = this.#expected[key];
    if (!Array.isArray(value)) throw new Error(`${this.#id} has no list ${key}`);
    return value.map((v) => Number(v));
  }

  /**
   * Allowed distance from an expected value, read from the row's tolerance text ("T 0.003; plane 1 mm; C 4 %").
   * Lengths are returned in millimetres, as the rows give them.
   */
  tolerance(expected: number, label = ''): number {
    const part = this.#tolerance
      .split(';')
      .map((p) => p.trim())
      .find((p) => (label === '' ? /^[\d.]/.test(p) : p.startsWith(`${label} `)));
    const match = /([\d.]+(?:e-?\d+)?) ?(%|mm|deg)?/.exec((part ?? '').slice(label.length));
    if (!match) throw new Error(`${this.#id} states no tolerance for "${label}"`);
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
