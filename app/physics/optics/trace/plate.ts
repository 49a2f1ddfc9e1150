/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
/**
 * Bow of panes: shape of a simply supported plate under uniform pressure, and the sealed cavity that causes it.
 *
 * @see S. Timoshenko and S. Woinowsky-Krieger, Theory of Plates and Shells, 2nd ed., 1959, art. 30 (Navier's solution)
 */

const highestMode = 99;

/** Sum of the Navier series Σ c(m, n) over odd m and n, c without load, stiffness and sides. */
function navierSum(aspect: number, term: (m: number, n: number, amplitude: number) => number): number {
  let sum = 0;
  for (let m = 1; m <= highestMode; m += 2) {
    for (let n = 1; n <= highestMode; n += 2) {
      const stiffness = (m * m + (n * n) / (aspect * aspect)) ** 2;
      sum += term(m, n, 16 / (Math.PI ** 6 * m * n * stiffness));
    }
  }
  return sum;
}

const alternate = (m: number): number => ((m - 1) / 2) % 2 === 0 ? 1 : -1;

/**
 * Centre deflection of a pane as a multiple of q a⁴/D, a the short side.
 *
 * @param aspect Long side over short side. ≥ 1
 */
export function centreDeflectionCoefficient(aspect: number): number {
  if (!(aspect >= 1)) throw new RangeError(`aspect = ${aspect}; allowed 1 and more`);
  return navierSum(aspect, (m, n, c) => c * alternate(m) * alternate(n));
}

/** Mean deflection over centre deflection. */
export function meanOverCentre(aspect: number): number {
  const mean = navierSum(aspect, (m, n, c) => (c * 4) / (Math.PI * Math.PI * m * n));
  return mean / centreDeflectionCoefficient(aspect);
}

/**
 * Radii of curvature at the centre as multiples of a²/w₀: along the short side and along the long side.
 * The sagitta rule would give 1/8 for both.
 */
export function centreRadiusCoefficients(aspect: number): { readonly short: number; readonly long: number } {
  const centre = centreDeflectionCoefficient(aspect);
  const short = navierSum(aspect, (m, n, c) => c * alternate(m) * alternate(n) * (m * Math.PI) ** 2);
  const long = navierSum(aspect, (m, n, c) => c * alternate(m) * alternate(n) * ((n * Math.PI) / aspect) ** 2);
  return { short: centre / short, long: centre / long };
}

/** Bending stiffness of a pane. [N·m] */
export function plateStiffness(youngPa: number, thicknessM: number, poisson: number): number {
  return (youngPa * thicknessM ** 3) / (12 * (1 - poisson * poisson));
}

export interface SealedUnit {
  readonly shortSideM: number;
  readonly longSideM: number;
  readonly outerThicknessM: number;
  readonly innerThicknessM: number;
  readonly gapM: number;
  readonly youngPa: number;
  readonly poisson: number;
  readonly sealPressurePa: number;
  readonly sealTemperatureK: number;
  readonly pressurePa: number;
  readonly temperatureK: number;
}

/**
 * Bow of the outer pane of a sealed double unit: ideal gas in the cavity, linear plates, both panes flex.
 *
 * Linear theory holds while the bow stays below about the pane's thickness; a measured bow always has precedence.
 *
 * @returns Cavity over outside pressure [Pa] and deflection of the outer pane's centre, outward positive [m].
 */
export function sealedUnitBow(unit: SealedUnit): { readonly pressureDifferencePa: number; readonly outerDeflectionM: number } {
  const aspect = unit.longSideM / unit.shortSideM;
  const area = unit.shortSideM * unit.longSideM;
  const alpha = centreDeflectionCoefficient(aspect);
  const mean = meanOverCentre(aspect);
  const bowPerPa = (thickness: number): number =>
    (alpha * unit.shortSideM ** 4) / plateStiffness(unit.youngPa, thickness, unit.poisson);
  const outer = bowPerPa(unit.outerThicknessM);
  const volumePerPa = mean * area * (outer + bowPerPa(unit.innerThicknessM));
  const volume = area * unit.gapM;
  const amount = (unit.sealPressurePa * volume * unit.temperatureK) / unit.sealTemperatureK;
  // (p₀ + q)(V + kq) = amount, solved for the root that vanishes with the load.
  const b = volume + volumePerPa * unit.pressurePa;
  const c = unit.pressurePa * volume - amount;
  const q = (-2 * c) / (b + Math.sqrt(b * b - 4 * volumePerPa * c));
  return { pressureDifferencePa: q, outerDeflectionM: q * outer };
}

const gridSteps = 96;
const shapeModes = 31;

/**
 * Slopes of a pane bowed to depth 1 at its centre, over a quarter of it, ready for interpolation.
 * Rows run along the height; entry (i, j) lies at x = i·width/(2·steps), y = j·height/(2·steps) from the centre.
 */
export class PlateShape {
  readonly #depth: Float64Array;
  readonly #slopeX: Float64Array;
  readonly #slopeY: Float64Array;
  readonly #scaleX: number;
  readonly #scaleY: number;
  readonly #halfX: number;
  readonly #halfY: number;

  constructor(widthM: number, heightM: number) {
    const size = (gridSteps + 1) ** 2;
    this.#depth = new Float64Array(size);
    this.#slopeX = new Float64Array(size);
    this.#slopeY = new Float64Array(size);
    this.#halfX = widthM / 2;
    this.#halfY = heightM / 2;
    this.#scaleX = gridSteps / this.#halfX;
    this.#scaleY = gridSteps / this.#halfY;
    this.#tabulate(widthM, heightM);
  }

  #tabulate(a: number, b: number): void {
    const n1 = gridSteps + 1;
    for (let n = 1; n <= shapeModes; n += 2) {
      const alongX = new Float64Array(n1);
      const slopeX = new Float64Array(n1);
      for (let m = 1; m <= shapeModes; m += 2) {
        const c = (alternate(m) * alternate(n)) / (m * n * ((m / a) ** 2 + (n / b) ** 2) ** 2);
        for (let i = 0; i < n1; i++) {
          const phase = (m * Math.PI * i) / (2 * gridSteps);
          alongX[i] = alongX[i]! + c * Math.cos(phase);
          slopeX[i] = slopeX[i]! - c * ((m * Math.PI) / a) * Math.sin(phase);
        }
      }
      for (let j = 0; j < n1; j++) {
        const phase = (n * Math.PI * j) / (2 * gridSteps);
        const cos = Math.cos(phase);
        const sin = -((n * Math.PI) / b) * Math.sin(phase);
        for (let i = 0; i < n1; i++) {
          const k = j * n1 + i;
          this.#depth[k] = this.#depth[k]! + alongX[i]! * cos;
          this.#slopeX[k] = this.#slopeX[k]! + slopeX[i]! * cos;
          this.#slopeY[k] = this.#slopeY[k]! + alongX[i]! * sin;
        }
      }
    }
    const centre = this.#depth[0]!;
    for (const table of [this.#depth, this.#slopeX, this.#slopeY]) for (let k = 0; k < table.length; k++) table[k] = table[k]! / centre;
  }

  /** Depth (1 at the centre) and its gradient [1/m] at a point of the pane, written to out[0…2]. */
  at(x: number, y: number, out: Float64Array): void {
    const n1 = gridSteps + 1;
    const u = Math.min(this.#halfX, Math.abs(x)) * this.#scaleX;
    const v = Math.min(this.#halfY, Math.abs(y)) * this.#scaleY;
    const i = Math.min(gridSteps - 1, u | 0);
    const j = Math.min(gridSteps - 1, v | 0);
    const s = u - i;
    const t = v - j;
    const k = j * n1 + i;
    const w00 = (1 - s) * (1 - t);
    const w10 = s * (1 - t);
    const w01 = (1 - s) * t;
    const w11 = s * t;
    const d = this.#depth;
    const p = this.#slopeX;
    const q = this.#slopeY;
    out[0] = w00 * d[k]! + w10 * d[k + 1]! + w01 * d[k + n1]! + w11 * d[k + n1 + 1]!;
    const gx = w00 * p[k]! + w10 * p[k + 1]! + w01 * p[k + n1]! + w11 * p[k + n1 + 1]!;
    const gy = w00 * q[k]! + w10 * q[k + 1]! + w01 * q[k + n1]! + w11 * q[k + n1 + 1]!;
    out[1] = x < 0 ? -gx : gx;
    out[2] = y < 0 ? -gy : gy;
  }
}
