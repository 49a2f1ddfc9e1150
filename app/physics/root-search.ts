/**
 * Zero of a continuous function between two ends of opposite sign, by bisection guarded regula falsi.
 *
 * @returns Null if the ends do not bracket a zero.
 */
export function findRoot(f: (x: number) => number, low: number, high: number, tolerance: number): number | null {
  let a = low;
  let b = high;
  let fa = f(a);
  let fb = f(b);
  if (fa === 0) return a;
  if (fb === 0) return b;
  if (fa * fb > 0) return null;
  for (let step = 0; step < 200 && Math.abs(b - a) > tolerance; step++) {
    // Every third step halves the bracket, so that a badly curved function cannot stall the secant.
    const secant = b - (fb * (b - a)) / (fb - fa);
    const middle = (a + b) / 2;
    const x = step % 3 === 2 || !(secant > Math.min(a, b) && secant < Math.max(a, b)) ? middle : secant;
    const fx = f(x);
    if (fx === 0) return x;
    if (fa * fx < 0) {
      b = x;
      fb = fx;
    } else {
      a = x;
      fa = fx;
    }
  }
  return (a + b) / 2;
}

/** Place of the least value of a function with one minimum in the interval, by golden section. */
export function findMinimum(f: (x: number) => number, low: number, high: number, tolerance: number): number {
  const golden = (Math.sqrt(5) - 1) / 2;
  let a = low;
  let b = high;
  let c = b - golden * (b - a);
  let d = a + golden * (b - a);
  let fc = f(c);
  let fd = f(d);
  while (b - a > tolerance) {
    if (fc < fd) {
      b = d;
      d = c;
      fd = fc;
      c = b - golden * (b - a);
      fc = f(c);
    } else {
      a = c;
      c = d;
      fc = fd;
      d = a + golden * (b - a);
      fd = f(d);
    }
  }
  return (a + b) / 2;
}
