import type { ReviewField } from './finding.ts';
import { foundPrecisionLabels, onsetBasisLabels } from './incident.ts';
import type { FoundPrecision, OnsetBasis } from './incident.ts';
import { formatDayClock } from './local-time.ts';
import { measureMethodLabels, sceneOpticLabels, targetMaterialLabels } from './scene.ts';
import type { Measured, Scene } from './scene.ts';

/** One input as the reviewer reads it, before any conclusion: value, ±, method, and what a plain check makes of it. */
export interface InputRow {
  readonly label: string;
  readonly value: string;
  readonly plusMinus: string;
  readonly method: string;
  readonly check: string;
}

export interface InputGroup {
  readonly field: ReviewField;
  readonly heading: string;
  readonly rows: readonly InputRow[];
}

export interface ReviewSource {
  readonly zone: string;
  readonly foundAt: Date | null;
  readonly foundPrecision: FoundPrecision;
  readonly foundClockErrorS: number;
  readonly onsetEarliestAt: Date | null;
  readonly onsetLatestAt: Date | null;
  readonly onsetBasis: OnsetBasis | null;
  readonly scene: Scene | null;
  readonly sceneVersion: number | null;
  readonly run: { readonly number: number; readonly engineVersion: string; readonly sceneVersion: number | null; readonly inputHash: string } | null;
  readonly photos: readonly { readonly label: number | null; readonly fileName: string; readonly sha256: string }[];
}

/** Inputs of a case in the order in which they are checked. Nothing that anybody concluded is among them. */
export function reviewInputs(source: ReviewSource): readonly InputGroup[] {
  const { scene } = source;
  const groups: readonly InputGroup[] = [
    { field: 'onset-window', heading: 'Time', rows: timeRows(source) },
    { field: 'optic', heading: 'Optic', rows: scene ? opticRows(scene) : [] },
    { field: 'mark', heading: 'Opening, mark and target', rows: scene ? markRows(scene) : [] },
    { field: 'weather', heading: 'Skyline and air', rows: scene ? airRows(scene) : [] },
    { field: 'reconstruction', heading: 'Reconstruction it rests on', rows: runRows(source) },
    { field: 'photos', heading: 'Photos', rows: source.photos.map((photo) => plain(`Photo ${photo.label ?? ''}`.trim(), photo.fileName, 'SHA-256', photo.sha256.slice(0, 16))) },
  ];
  return groups.map((group) => (group.rows.length > 0 ? group : { ...group, rows: [plain('Nothing recorded', 'none', '', 'missing')] }));
}

const plain = (label: string, value: string, method = '', check = ''): InputRow => ({ label, value, plusMinus: '', method, check });

function row(label: string, value: Measured | undefined, unit: string, check = ''): InputRow[] {
  if (!value) return [];
  const open = value.plusMinus === undefined ? 'no ± given' : value.plusMinus === 0 ? 'a ± of 0 is not possible for a measured value' : '';
  return [
    {
      label,
      value: `${value.value} ${unit}`,
      plusMinus: value.plusMinus === undefined ? '' : String(value.plusMinus),
      method: measureMethodLabels[value.method].toLowerCase(),
      check: [check, open].filter(Boolean).join('; '),
    },
  ];
}

function timeRows(source: ReviewSource): InputRow[] {
  const at = (instant: Date | null) => (instant ? formatDayClock(instant, source.zone) : 'not known');
  const corrected = source.foundAt ? new Date(source.foundAt.getTime() - source.foundClockErrorS * 1_000) : null;
  const clock = source.foundClockErrorS === 0 ? 'no clock error recorded' : `${Math.abs(source.foundClockErrorS / 60)} min ${source.foundClockErrorS > 0 ? 'fast' : 'slow'}, so ${at(corrected)}`;
  const ordered = corrected && source.onsetLatestAt && source.onsetLatestAt > corrected ? 'later than it was found' : '';
  return [
    plain('Found or alarm', at(source.foundAt), foundPrecisionLabels[source.foundPrecision].toLowerCase(), clock),
    plain('Onset earliest', at(source.onsetEarliestAt), source.onsetBasis ? onsetBasisLabels[source.onsetBasis].toLowerCase() : '', source.onsetEarliestAt ? '' : 'missing'),
    plain('Onset latest', at(source.onsetLatestAt), '', source.onsetLatestAt ? ordered : 'missing'),
    plain('Clock of the place', source.zone.replaceAll('_', ' ')),
  ];
}

function opticRows({ optic }: Scene): InputRow[] {
  return [
    plain('Kind', sceneOpticLabels[optic.kind], '', optic.kind === 'dont-know' ? 'recorded as unknown' : ''),
    ...row('Diameter', optic.diameterMm, 'mm'),
    ...row('Width', optic.widthMm, 'mm'),
    ...row('Height', optic.heightMm, 'mm'),
    ...row('Thickness', optic.thicknessMm, 'mm'),
    ...row('Radius of curvature', optic.radiusOfCurvatureM, 'm', radiusCheck(optic.radiusOfCurvatureM, optic.focalLengthMm)),
    ...row('Focal length', optic.focalLengthMm, 'mm'),
    ...row('Bow at the centre', optic.centreBowMm, 'mm'),
    ...row('Width over which the bow was taken', optic.paneWidthMm, 'mm'),
    ...row('Depth of liquid', optic.liquidDepthMm, 'mm'),
    ...row('Reflectance', optic.reflectance, ''),
    ...row('Faces', optic.faceAzimuthDeg, '° true'),
    ...row('Tilt', optic.faceTiltDeg, '°, 0 level, +90 to the zenith'),
    plain('Moved since', { yes: 'yes', no: 'no', 'dont-know': 'not known' }[optic.movedSince], '', optic.movedSince === 'no' ? '' : 'how it stood is then a statement, not a measurement'),
  ];
}

/** A mirror's focal length is half its radius of curvature, near the axis. */
function radiusCheck(radiusM: Measured | undefined, focalLengthMm: Measured | undefined): string {
  if (!radiusM || !focalLengthMm) return '';
  const halfMm = radiusM.value * 500;
  const apart = Math.abs(halfMm - focalLengthMm.value) / focalLengthMm.value;
  return `half of it is ${Math.round(halfMm)} mm, ${apart < 0.05 ? 'agrees with the focal length' : 'which is not the focal length given'}`;
}

function markRows({ opening, mark, target }: Scene): InputRow[] {
  return [
    ...row('Opening faces', opening?.azimuthDeg, '° true'),
    ...(opening ? [plain('Glass in the path', opening.glass.replaceAll('-', ' '))] : []),
    ...row('Bearing, optic to mark', mark.bearingDeg, '° true'),
    ...row('Elevation, optic to mark', mark.elevationDeg, '°'),
    ...row('Distance, optic to mark', mark.distanceMm, 'mm'),
    ...row('Length of the mark', mark.lengthMm, 'mm', mark.lengthMm && mark.widthMm && mark.lengthMm.value < mark.widthMm.value ? 'shorter than it is wide' : ''),
    ...row('Width of the mark', mark.widthMm, 'mm'),
    ...(mark.shape ? [plain('Shape', mark.shape.replaceAll('-', ' '))] : []),
    ...row('Direction of the trail', mark.trailHeadingDeg, '° true'),
    ...(mark.damage ? [plain('Damage', mark.damage.replaceAll('-', ' '))] : []),
    plain('Target', targetMaterialLabels[target.material], '', target.sampleKept === 'yes' ? 'sample kept' : 'no sample kept'),
    ...row('Thickness of the target', target.thicknessMm, 'mm'),
  ];
}

function airRows({ skyline, air }: Scene): InputRow[] {
  return [
    skyline
      ? { label: 'Skyline', value: `${skyline.points.length} points`, plusMinus: `${skyline.plusMinusDeg}°`, method: skyline.source, check: '' }
      : plain('Skyline', 'not measured', '', 'whatever stood in the way is not counted'),
    plain('Climate class', air.climateClass.replaceAll('-', ' '), 'assumed'),
    ...(air.temperatureC === undefined ? [] : [plain('Air temperature', `${air.temperatureC} °C`)]),
    ...(air.pressureHpa === undefined ? [] : [plain('Air pressure', `${air.pressureHpa} hPa`)]),
    air.dni
      ? plain('Direct sunlight on record', `${air.dni.values.length} values`, `${air.dni.source}, ${air.dni.basis.replaceAll('-', ' ')}`, stationCheck(air.dni.stationDistanceKm))
      : plain('Direct sunlight on record', 'none with the measurements', '', 'a run goes by the weather records of the case, where there are any'),
  ];
}

function stationCheck(distanceKm: number | undefined): string {
  if (distanceKm === undefined) return 'distance of the station not given';
  return distanceKm > 5 ? `${distanceKm} km away: cannot show a gap in the clouds here` : `${distanceKm} km away`;
}

function runRows({ run, sceneVersion }: ReviewSource): InputRow[] {
  if (!run) return [];
  const stale = run.sceneVersion !== null && sceneVersion !== null && run.sceneVersion !== sceneVersion;
  return [
    plain('Run', String(run.number), `engine ${run.engineVersion}`, `input ${run.inputHash.slice(0, 16)}`),
    plain('Measurements it used', run.sceneVersion === null ? 'not stated' : `version ${run.sceneVersion}`, '', stale ? `the measurements are now at version ${sceneVersion}` : ''),
  ];
}
