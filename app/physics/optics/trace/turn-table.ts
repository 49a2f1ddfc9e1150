/**
 * Cosines and sines by share of a turn, for loops that sample circles. Read linearly between 1/8192 of a turn, so that
 * the error stays below 8e-8 of the radius.
 */
export const turnSteps = 8192;
export const turnCosines = new Float64Array(turnSteps + 1);
export const turnSines = new Float64Array(turnSteps + 1);
for (let i = 0; i <= turnSteps; i++) {
  turnCosines[i] = Math.cos((2 * Math.PI * i) / turnSteps);
  turnSines[i] = Math.sin((2 * Math.PI * i) / turnSteps);
}
