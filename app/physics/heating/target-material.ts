import type { SourceRef } from '#app/physics/model/stated.ts';

/** Rows of the reference data that a figure comes from. */
export interface Provenance {
  readonly rowIds: readonly string[];
  readonly source: SourceRef;
}

/** A stated or measured interval with the rows it comes from. */
export interface Sourced extends Provenance {
  readonly low: number;
  readonly high: number;
}

/** Time to piloted ignition of one product, by incident flux of the apparatus. */
export interface IgnitionSeries extends Provenance {
  readonly product: string;
  readonly points: readonly (readonly [fluxKwm2: number, seconds: number])[];
}

/** One row of the target materials. What is null is unknown, and the outcome that needs it is then "cannot tell". */
export interface TargetMaterial {
  readonly name: string;
  /** Solar absorptance as found, and once charred or darkened. */
  readonly absorptanceFresh: Sourced | null;
  readonly absorptanceCharred: Sourced | null;
  readonly conductivityWmk: number | null;
  readonly densityKgm3: number | null;
  readonly heatCapacityJkgk: number | null;
  readonly thermalSource: Provenance | null;
  /** Usual thickness where it is a thin sheet; null for thick pieces. [m] */
  readonly thicknessM: number | null;
  /** Temperature at which the sheet deforms. [°C] */
  readonly softeningC: Sourced | null;
  /** True for wood, paper, cloth and straw: pale when fresh, black once charred. */
  readonly chars: boolean;
  /** Lowest flux that made samples smoulder. [kW/m²] */
  readonly smoulder: (Sourced & { readonly sampleSizeMm: number }) | null;
  readonly ignition: readonly IgnitionSeries[];
  /** Lowest flux that ignited samples with a pilot. [kW/m²] */
  readonly criticalFlux: Sourced | null;
  /** Clear or pale plastics take the light in depth, so that the surface formulas do not hold. */
  readonly absorbsInDepth: boolean;
  readonly burnsSkin: boolean;
}
