/** Two standard normal numbers from two uniform ones (Box and Muller 1958), written to out[at] and out[at + 1]. */
export function gaussPair(u: number, v: number, out: Float64Array, at: number): void {
  const radius = Math.sqrt(-2 * Math.log(u));
  const turn = 2 * Math.PI * v;
  out[at] = radius * Math.cos(turn);
  out[at + 1] = radius * Math.sin(turn);
}
