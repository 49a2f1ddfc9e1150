/** Spreads that the sampling takes where the input states none, each one sigma relative to its value. */
export const samplingSigmas = {
  /** What an optic passes or reflects, where it is a number of the input. */
  throughput: { sigmaRel: 0.05, source: { text: 'our choice', verified: false } },
  /** Transmittance of glass in the path. */
  glass: { sigmaRel: 0.05, source: { text: 'our choice', verified: false } },
  /** Measured time to ignition, between products, laboratories and repeats. */
  ignitionTime: { sigmaRel: 0.3, source: { text: 'spread of cone calorimeter times, from memory', verified: false } },
} as const;
