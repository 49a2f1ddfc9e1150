import type { ReleasedCase } from './released-case.ts';
import { measureMethodLabels, sceneOpticLabels, targetMaterialLabels } from './scene.ts';
import type { Measured, Scene } from './scene.ts';

type Row = ReleasedCase['measurements'][number];

/**
 * The measured scene as it leaves the house: numbers with their ± and method, and words from our own lists. Nothing that
 * anybody typed is among them (colour, name of a station, names on the skyline), and a field that is not named stays in.
 */
export function releasedMeasurements(scene: Scene | null): Row[] {
  return scene ? [...opticRows(scene), ...markRows(scene), ...airRows(scene)] : [];
}

const stated = (group: string, label: string, value: string): Row => ({ group, label, value, plusMinus: '', unit: '', method: '' });

function measured(group: string, label: string, value: Measured | undefined, unit: string): Row[] {
  if (!value) return [];
  return [{ group, label, value: String(value.value), plusMinus: value.plusMinus === undefined ? '' : String(value.plusMinus), unit, method: measureMethodLabels[value.method] }];
}

const yesNo = { yes: 'Yes', no: 'No', 'dont-know': 'Not known' } as const;
const sentence = (id: string): string => {
  const words = id.replaceAll('-', ' ');
  return words.charAt(0).toUpperCase() + words.slice(1);
};

function opticRows({ optic }: Scene): Row[] {
  const group = 'Optic';
  return [
    stated(group, 'Kind', optic.kind === 'dont-know' ? 'Not known' : sceneOpticLabels[optic.kind]),
    ...measured(group, 'Diameter', optic.diameterMm, 'mm'),
    ...measured(group, 'Width', optic.widthMm, 'mm'),
    ...measured(group, 'Height', optic.heightMm, 'mm'),
    ...measured(group, 'Thickness', optic.thicknessMm, 'mm'),
    ...measured(group, 'Radius of curvature', optic.radiusOfCurvatureM, 'm'),
    ...measured(group, 'Focal length', optic.focalLengthMm, 'mm'),
    ...measured(group, 'Bow at the centre', optic.centreBowMm, 'mm'),
    ...measured(group, 'Width over which the bow was taken', optic.paneWidthMm, 'mm'),
    ...measured(group, 'Depth of liquid', optic.liquidDepthMm, 'mm'),
    ...(optic.material ? [stated(group, 'Material', sentence(optic.material))] : []),
    ...measured(group, 'Reflectance', optic.reflectance, ''),
    ...measured(group, 'Faces', optic.faceAzimuthDeg, '° true'),
    ...measured(group, 'Tilt', optic.faceTiltDeg, '° above level'),
    ...measured(group, 'Height above ground', optic.heightAboveGroundM, 'm'),
    stated(group, 'Moved since', yesNo[optic.movedSince]),
  ];
}

function markRows({ opening, mark, target }: Scene): Row[] {
  return [
    ...measured('Opening', 'Opening faces', opening?.azimuthDeg, '° true'),
    ...(opening ? [stated('Opening', 'Glass in the path', sentence(opening.glass))] : []),
    ...measured('Mark', 'Bearing, optic to mark', mark.bearingDeg, '° true'),
    ...measured('Mark', 'Elevation, optic to mark', mark.elevationDeg, '°'),
    ...measured('Mark', 'Distance, optic to mark', mark.distanceMm, 'mm'),
    ...measured('Mark', 'Length of the mark', mark.lengthMm, 'mm'),
    ...measured('Mark', 'Width of the mark', mark.widthMm, 'mm'),
    ...(mark.shape ? [stated('Mark', 'Shape', sentence(mark.shape))] : []),
    ...measured('Mark', 'Direction of the trail', mark.trailHeadingDeg, '° true'),
    ...(mark.damage ? [stated('Mark', 'Damage', sentence(mark.damage))] : []),
    stated('Target', 'Material', target.material === 'dont-know' ? 'Not known' : targetMaterialLabels[target.material]),
    ...measured('Target', 'Thickness', target.thicknessMm, 'mm'),
    stated('Target', 'Sample kept', yesNo[target.sampleKept]),
  ];
}

const dniBasis = { measured: 'Measured', derived: 'Derived from measured global irradiance', 'hourly-archive': 'Hourly archive' } as const;

function airRows({ skyline, air }: Scene): Row[] {
  const group = 'Skyline and air';
  return [
    skyline ? { group, label: 'Skyline', value: String(skyline.points.length), plusMinus: `${skyline.plusMinusDeg}°`, unit: 'points', method: sentence(skyline.source) } : stated(group, 'Skyline', 'Not measured'),
    ...(air.temperatureC === undefined ? [] : [{ ...stated(group, 'Air temperature', String(air.temperatureC)), unit: '°C' }]),
    ...(air.pressureHpa === undefined ? [] : [{ ...stated(group, 'Air pressure', String(air.pressureHpa)), unit: 'hPa' }]),
    stated(group, 'Climate class', sentence(air.climateClass)),
    // The weather that a run went by leaves as a part of its own.
    ...(air.dni
      ? [{ group, label: 'Direct sunlight on record', value: String(air.dni.values.length), plusMinus: '', unit: 'values', method: `${dniBasis[air.dni.basis]}${air.dni.stationDistanceKm === undefined ? '' : `, ${air.dni.stationDistanceKm} km away`}` }]
      : []),
  ];
}
