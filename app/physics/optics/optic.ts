/**
 * What the engine knows of an optic: its shape, its material and how it stood.
 *
 * Every length is in metres, every angle in degrees, azimuths clockwise from true north, elevations above the
 * horizontal. `axisAzimuthDeg`/`axisElevationDeg` is the direction in which the working face looks: for a mirror,
 * dish, façade or pane the outward normal of the reflecting face; for a lens the direction from which it is meant to
 * receive light. Spheres have no axis.
 */

/** A value with its one-sigma uncertainty, in the unit that its field name states. */
export interface Uncertain {
  readonly value: number;
  readonly sigma: number;
}

/** Direction in which a face looks. */
export interface Pose {
  readonly axisAzimuthDeg: number;
  readonly axisElevationDeg: number;
}

/** Refracting material: either a class row of `materials`, or an explicit index and absorption. */
export type RefractiveMaterial =
  | { readonly name: RefractiveMaterialName }
  | { readonly name: 'explicit'; readonly refractiveIndex: number; readonly absorptionPerM: number };

export const refractiveMaterialNames = [
  'crown-glass',
  'soda-lime-clear',
  'soda-lime-low-iron',
  'acrylic',
  'polycarbonate',
  'water',
] as const;
export type RefractiveMaterialName = (typeof refractiveMaterialNames)[number];

interface Common {
  /** Gaussian surface slope error, one sigma. [mrad] Left out: class default, listed under assumptions. */
  readonly slopeErrorMrad?: number;
}

/** Glass or plastic lens, plano-convex or symmetric; focal length or radius must be known. */
export interface LensOptic extends Common, Pose {
  readonly kind: 'lens';
  readonly diameterM: number;
  readonly focalLengthM: number;
  readonly centreThicknessM?: number;
  readonly shape: 'plano-convex' | 'biconvex';
  /** Which face looks along the axis, for a plano-convex lens. */
  readonly faceToSun: 'curved' | 'flat';
  readonly material: RefractiveMaterial;
}

/** Solid or liquid-filled full sphere: ornament, ball, snow globe, round vase filled to the top. */
export interface SphereOptic extends Common {
  readonly kind: 'sphere';
  readonly diameterM: number;
  readonly material: RefractiveMaterial;
}

/** Liquid-filled round bottle or jar: line focus beside its axis. The axis here is the bottle's own long axis. */
export interface CylinderOptic extends Common, Pose {
  readonly kind: 'cylinder';
  readonly diameterM: number;
  readonly lengthM: number;
  readonly material: RefractiveMaterial;
}

/** Round bowl partly filled with liquid: a flat liquid top over a spherical bottom. */
export interface BowlOptic extends Common {
  readonly kind: 'bowl';
  readonly radiusM: number;
  readonly liquidDepthM: number;
  readonly material: RefractiveMaterial;
}

/** Concave mirror; `radiusM` is the radius of curvature (twice the focal length for a paraboloid's vertex). */
export interface MirrorOptic extends Common, Pose {
  readonly kind: 'concave-mirror' | 'polished-bowl' | 'dish';
  readonly figure: 'spherical' | 'parabolic';
  readonly diameterM: number;
  readonly radiusM: number;
  readonly reflectance: number;
}

/** Cylindrical reflector: concave façade of panes, curved parapet, cladding, trough, vehicle panel. Line focus. */
export interface CurvedReflectorOptic extends Common, Pose {
  readonly kind: 'facade' | 'curved-metal' | 'trough';
  readonly radiusM: number;
  /** Chord across the curve. */
  readonly chordM: number;
  /** Extent along the straight direction. */
  readonly lengthM: number;
  /** Direction of the straight generators. A façade curved in plan has vertical ones. */
  readonly generators: 'vertical' | 'horizontal';
  /** Width of one flat pane along the curve; left out for smooth metal. */
  readonly paneWidthM?: number;
  /** Tilt of each pane against the ideal curve, one sigma. [mrad] Left out: class value. */
  readonly paneTiltMrad?: number;
  /** Inward bow at the centre of each pane. [m] Left out: flat. */
  readonly paneBowM?: number;
  readonly reflectance: number;
}

/** Insulating glass unit whose outer pane bows inward. */
export interface PaneOptic extends Common, Pose {
  readonly kind: 'bowed-pane';
  readonly widthM: number;
  readonly heightM: number;
  /** Inward deflection of the centre against the edge plane; positive is concave to the outside. */
  readonly centreBowM: number;
  readonly reflectance: number;
  /** Surface that carries the coating, counted from outside; 1 and 2 focus when bowed in. */
  readonly coatingSurface?: 1 | 2 | 3 | 4;
}

/** Flat grooved lens sheet. */
export interface FresnelOptic extends Common, Pose {
  readonly kind: 'fresnel';
  readonly widthM: number;
  readonly heightM: number;
  readonly focalLengthM: number;
  readonly transmittance: number;
}

/** Shallow dome or rooflight with water standing in it. */
export interface DomeOptic extends Common {
  readonly kind: 'ponded-dome';
  readonly radiusM: number;
  readonly pondDiameterM: number;
}

/** Telescope, finder or binocular objective: taken as its thin objective lens or mirror at prime focus. */
export interface TelescopeOptic extends Common, Pose {
  readonly kind: 'telescope';
  readonly diameterM: number;
  readonly focalLengthM: number;
  readonly transmittance: number;
}

/** What the bow of a pane follows from where it was not measured: the sealed cavity of its unit. */
export interface SealedUnitInput {
  readonly outerThicknessM: number;
  readonly innerThicknessM: number;
  readonly gapM: number;
  /** Pressure and temperature at which the unit was sealed. */
  readonly sealPressureHpa: number;
  readonly sealTemperatureC: number;
  /** Temperature of the gas in the cavity at the time of the incident. */
  readonly cavityTemperatureC: number;
}

/** A pane as it is asked about: its bow measured, or the unit that it belongs to. A measured bow has precedence. */
export interface PaneInput extends Omit<PaneOptic, 'centreBowM'> {
  readonly centreBowM?: number;
  readonly sealedUnit?: SealedUnitInput;
}

/** An optic as it is asked about. */
export type OpticInput = Exclude<Optic, PaneOptic> | PaneInput;

export type Optic =
  | LensOptic
  | SphereOptic
  | CylinderOptic
  | BowlOptic
  | MirrorOptic
  | CurvedReflectorOptic
  | PaneOptic
  | FresnelOptic
  | DomeOptic
  | TelescopeOptic;

export type OpticKind = Optic['kind'];

/** Every kind the engine models. `unknown` is not among them: without an optic nothing but the sun is computed. */
export const opticKinds = [
  'lens',
  'sphere',
  'cylinder',
  'bowl',
  'concave-mirror',
  'polished-bowl',
  'dish',
  'facade',
  'curved-metal',
  'trough',
  'bowed-pane',
  'fresnel',
  'ponded-dome',
  'telescope',
] as const satisfies readonly OpticKind[];
