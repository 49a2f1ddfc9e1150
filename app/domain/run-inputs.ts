import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { OpticInput } from '#app/physics/optics/optic.ts';
import { formatDayClock } from './local-time.ts';
import { opticKindLabels, refractiveMaterialLabels } from './run-words.ts';
import { targetMaterialLabels, targetMaterials } from './scene.ts';

/** A frozen input in words, group by group, as it went into the engine. */
export interface InputGroup {
  readonly heading: string;
  readonly facts: readonly { readonly term: string; readonly value: string; readonly note?: string }[];
}
type Fact = InputGroup['facts'][number];

const round = (value: number, digits = 4): string => String(Number(value.toPrecision(digits)));
const mm = (metres: number): string => `${round(metres * 1000)} mm`;
const length = (metres: number): string => (metres < 2 ? mm(metres) : `${round(metres)} m`);
const fact = (term: string, value: string, note?: string): Fact => (note ? { term, value, note } : { term, value });
const some = <Value>(value: Value | undefined, make: (value: Value) => Fact): Fact[] => (value === undefined ? [] : [make(value)]);

function placeGroup({ place }: ReconstructionInput): InputGroup {
  return {
    heading: 'Place',
    // Two decimals: enough for the reader, and not a door.
    facts: [
      fact('Position', `${place.latitudeDeg.toFixed(2)}, ${place.longitudeDeg.toFixed(2)}`, 'latitude, longitude, °'),
      fact('Height', `${round(place.elevationM)} m`, `above sea; optic ${round(place.heightAboveGroundM)} m above ground`),
    ],
  };
}

function timeGroup({ window, place }: ReconstructionInput): InputGroup {
  return {
    heading: 'Time',
    facts: [
      fact('Window from', formatDayClock(new Date(window.startUtc), place.zone)),
      fact('Window to', formatDayClock(new Date(window.endUtc), place.zone)),
      fact('Clock', `±${window.clockSigmaS < 120 ? `${round(window.clockSigmaS)} s` : `${round(window.clockSigmaS / 60)} min`}`, 'one sigma'),
    ],
  };
}

function poseFacts(optic: OpticInput): Fact[] {
  return 'axisAzimuthDeg' in optic ? [fact(optic.kind === 'cylinder' ? 'Axis points to' : 'Faces', `${round(optic.axisAzimuthDeg)}° true`, `${round(optic.axisElevationDeg)}° above level`)] : [];
}

function shapeFacts(optic: OpticInput): Fact[] {
  switch (optic.kind) {
    case 'lens':
      return [fact('Diameter', mm(optic.diameterM)), fact('Focal length', length(optic.focalLengthM)), fact('Shape', optic.shape, `${optic.faceToSun} face to the sun`)];
    case 'sphere':
      return [fact('Diameter', mm(optic.diameterM))];
    case 'cylinder':
      return [fact('Diameter', mm(optic.diameterM)), fact('Length', mm(optic.lengthM))];
    case 'bowl':
      return [fact('Radius', mm(optic.radiusM)), fact('Liquid depth', mm(optic.liquidDepthM))];
    case 'concave-mirror':
    case 'polished-bowl':
    case 'dish':
      return [fact('Diameter', mm(optic.diameterM)), fact('Radius of curvature', length(optic.radiusM), optic.figure), fact('Reflectance', round(optic.reflectance))];
    case 'facade':
    case 'curved-metal':
    case 'trough':
      return [
        fact('Radius of curvature', `${round(optic.radiusM)} m`), fact('Chord', length(optic.chordM)), fact('Length', length(optic.lengthM), `${optic.generators} straight lines`),
        ...some(optic.paneWidthM, (value) => fact('Pane width', length(value))), fact('Reflectance', round(optic.reflectance)),
      ];
    case 'bowed-pane':
      return [fact('Size', `${round(optic.widthM)} × ${round(optic.heightM)} m`), ...some(optic.centreBowM, (value) => fact('Bow at the centre', mm(value))), ...some(optic.sealedUnit, (unit) => fact('Sealed unit', `${mm(unit.outerThicknessM)}, gap ${mm(unit.gapM)}, ${mm(unit.innerThicknessM)}`, `sealed at ${round(unit.sealPressureHpa)} hPa and ${round(unit.sealTemperatureC)} °C, cavity at ${round(unit.cavityTemperatureC)} °C`)), fact('Reflectance', round(optic.reflectance)), ...some(optic.coatingSurface, (value) => fact('Coated surface', String(value), 'counted from outside'))];
    case 'fresnel':
      return [fact('Size', `${round(optic.widthM)} × ${round(optic.heightM)} m`), fact('Focal length', length(optic.focalLengthM)), fact('Transmittance', round(optic.transmittance))];
    case 'ponded-dome':
      return [fact('Radius of curvature', length(optic.radiusM)), fact('Width of the water', length(optic.pondDiameterM))];
    case 'telescope':
      return [fact('Aperture', mm(optic.diameterM)), fact('Focal length', length(optic.focalLengthM)), fact('Transmittance', round(optic.transmittance))];
  }
}

function materialFacts(optic: OpticInput): Fact[] {
  if (!('material' in optic)) return [];
  const { material } = optic;
  return [material.name === 'explicit' ? fact('Index', round(material.refractiveIndex), `absorption ${round(material.absorptionPerM)} per m`) : fact('Material', refractiveMaterialLabels[material.name])];
}

function opticGroup({ optic, opticSigmaRel }: ReconstructionInput): InputGroup {
  if (!optic) return { heading: 'Optic', facts: [fact('Kind', 'not known', 'only sun, sky and skyline were examined')] };
  return {
    heading: 'Optic',
    facts: [
      fact('Kind', opticKindLabels[optic.kind]), ...shapeFacts(optic), ...materialFacts(optic), ...poseFacts(optic),
      ...some(optic.slopeErrorMrad, (value) => fact('Surface error', `${round(value)} mrad`)),
      ...some(opticSigmaRel, (value) => fact('Spread', `±${round(value * 100)} %`, 'focal length or radius, one sigma')),
    ],
  };
}

function openingGroup({ opening }: ReconstructionInput): InputGroup[] {
  if (!opening) return [];
  return [{
    heading: 'Opening',
    facts: [
      fact('Faces', `${round(opening.azimuthDeg)}° true ±${round(opening.azimuthSigmaDeg)}`, `lets the sun in up to ${round(opening.halfWidthDeg)}° either side`),
      fact('Glass', round(opening.transmittance), opening.transmittanceSource),
    ],
  }];
}

function occluderGroup({ occluders, occluderSigmaM }: ReconstructionInput): InputGroup[] {
  if (!occluders?.length) return [];
  return [{
    heading: 'Frame and bars',
    facts: [
      ...occluders.map((one, index) => fact(one.name ?? `${one.kind === 'opening' ? 'Opening' : 'Bar'} ${index + 1}`, `${one.corners.length} corners`, one.revealDepthM ? `${one.kind}, reveal ${mm(one.revealDepthM)} deep` : one.kind)),
      ...some(occluderSigmaM, (value) => fact('Spread of the corners', `±${mm(value)}`)),
    ],
  }];
}

function coordinateFacts({ eastM, northM, upM, sigmaM, lengthMm, widthMm, trailHeadingDeg }: NonNullable<ReconstructionInput['markCoordinates']>): Fact[] {
  return [
    fact('East, north, up', `${round(eastM * 1000)}, ${round(northM * 1000)}, ${round(upM * 1000)} mm ±${round(sigmaM * 1000)}`, 'from the optic'),
    ...some(lengthMm, (value) => fact('Length', `${round(value)} mm`)),
    ...some(widthMm, (value) => fact('Width', `${round(value)} mm`)),
    ...some(trailHeadingDeg, (value) => fact('Trail runs to', `${round(value)}° true`)),
  ];
}

function markGroup({ mark, markCoordinates, target }: ReconstructionInput): InputGroup {
  const place = mark
    ? [
        fact('Bearing to mark', `${round(mark.bearingDeg)}° true ±${round(mark.bearingSigmaDeg)}`),
        fact('Elevation', `${round(mark.elevationDeg)}° ±${round(mark.elevationSigmaDeg)}`, 'from the optic, above level'),
        fact('Distance', `${mm(mark.distanceM)} ±${round(mark.distanceSigmaM * 1000)}`),
        ...some(mark.lengthMm, (value) => fact('Length', `${round(value)} mm`)),
        ...some(mark.widthMm, (value) => fact('Width', `${round(value)} mm`)),
        ...some(mark.trailHeadingDeg, (value) => fact('Trail runs to', `${round(value)}° true`)),
        ...some(mark.normalAzimuthDeg, (value) => fact('Surface faces', `${round(value)}° true`, mark.normalElevationDeg === undefined ? '' : `${round(mark.normalElevationDeg)}° above level`)),
      ]
    : markCoordinates ? coordinateFacts(markCoordinates) : [fact('Place of the mark', 'not known')];
  const known = targetMaterials.find((material) => material === target?.materialId);
  const material = target ? [fact('Target', known ? targetMaterialLabels[known] : target.materialId, target.thicknessM === undefined ? undefined : `${mm(target.thicknessM)} thick`)] : [fact('Target', 'not known')];
  return { heading: 'Mark', facts: [...place, ...material] };
}

function skyGroup({ sky, skyline }: ReconstructionInput): InputGroup {
  return {
    heading: 'Sky',
    facts: [
      fact('Air class', sky.climateClass.replaceAll('-', ' '), 'median of a class, not of the day'),
      ...some(sky.pressureHpa, (value) => fact('Pressure', `${round(value)} hPa`)),
      ...some(sky.temperatureC, (value) => fact('Temperature', `${round(value)} °C`)),
      ...some(sky.dniSeries, (series) => fact('Direct irradiance', `${series.values.length} values`, `${series.basis.replaceAll('-', ' ')}: ${series.source}`)),
      skyline ? fact('Skyline', `${skyline.points.length} points ±${round(skyline.sigmaDeg)}°`) : fact('Skyline', 'not measured'),
    ],
  };
}

/** The groups of a frozen input, in the order of the light. */
export function inputGroups(input: ReconstructionInput): InputGroup[] {
  return [placeGroup(input), timeGroup(input), opticGroup(input), ...openingGroup(input), ...occluderGroup(input), markGroup(input), skyGroup(input)];
}

/** What differs between the inputs of two runs, as "before to after". */
export function inputChanges(before: ReconstructionInput, after: ReconstructionInput): { readonly term: string; readonly value: string }[] {
  const listed = (input: ReconstructionInput) => new Map(inputGroups(input).flatMap((group) => group.facts.map((one): [string, { term: string; value: string }] => [`${group.heading}/${one.term}`, one])));
  const [earlier, later] = [listed(before), listed(after)];
  return [...new Set([...earlier.keys(), ...later.keys()])].flatMap((key) => {
    const [from, to] = [earlier.get(key), later.get(key)];
    if (from?.value === to?.value) return [];
    return [{ term: (to ?? from)?.term ?? key, value: `${from?.value ?? 'not given'} to ${to?.value ?? 'not given'}` }];
  });
}
