import { formatIsoDay } from './local-time.ts';
import type { Measured, MeasureMethod, Scene } from './scene.ts';
import { measureMethodLabels } from './scene.ts';
import type { SceneField } from './scene-fields.ts';
import { markFields, openingFields, opticFields, opticFieldsFor, targetFields } from './scene-fields.ts';
import { storedMeasure } from './scene-form-fields.ts';

/** One line of the sheet that is taken to site; what is known already is filled in. */
export interface SheetRow {
  readonly number: number;
  readonly label: string;
  readonly help: string;
  readonly unit: string;
  readonly bearing: boolean;
  readonly value: string;
  readonly plusMinus: string;
  readonly method: string;
  readonly by: string;
  readonly on: string;
  /** Boxes to tick, for what is no number. */
  readonly choices: readonly string[];
}
export interface SheetGroup {
  readonly heading: string;
  readonly rows: readonly SheetRow[];
}

type Blank = Pick<SheetRow, 'label'> & Partial<Omit<SheetRow, 'number' | 'label'>>;
const blank = (row: Blank): Omit<SheetRow, 'number'> => ({ help: '', unit: '', bearing: false, value: '', plusMinus: '', method: '', by: '', on: '', choices: [], ...row });

function fieldRow(scene: Scene, field: SceneField): Omit<SheetRow, 'number'> {
  const stored: Measured | undefined = storedMeasure(scene, field);
  const method: MeasureMethod | undefined = stored?.method;
  return blank({
    label: field.label,
    help: shortHelp[`${field.part}.${field.key}`] ?? '',
    unit: field.unit,
    bearing: field.bearing === true,
    ...(stored ? { value: `${stored.value}`, plusMinus: stored.plusMinus === undefined ? '' : String(stored.plusMinus), by: stored.by ?? '', on: stored.on ? formatIsoDay(stored.on) : '' } : {}),
    ...(method ? { method: measureMethodLabels[method] } : {}),
  });
}

/** What fits into one line on paper. */
const shortHelp: Readonly<Record<string, string>> = {
  'optic.faceAzimuthDeg': 'wall line or shadow first',
  'optic.faceTiltDeg': '0 faces the horizon, +90 the sky',
  'optic.sagittaMm': 'feeler or depth rule, at the middle',
  'optic.centreBowMm': 'straightedge across the face',
  'optic.heightAboveGroundM': 'name the datum in the sketch',
  'opening.azimuthDeg': 'outward, square to the glass',
  'opening.sillMm': 'below the centre is negative',
  'mark.elevationDeg': 'down from the optic is negative',
  'mark.distanceMm': 'centre to centre, along the beam',
  'mark.trailHeadingDeg': 'from the deepest end',
};

/** Sizes that are asked for while nobody knows what the optic was. */
const anyOptic = ['diameterMm', 'widthMm', 'heightMm', 'sagittaOverMm', 'sagittaMm', 'faceAzimuthDeg', 'faceTiltDeg'];

function opticRows(scene: Scene): Omit<SheetRow, 'number'>[] {
  const chosen = scene.optic.kind === 'dont-know' ? opticFields.filter((field) => anyOptic.includes(field.key)) : opticFieldsFor(scene.optic.kind).first;
  const known = opticFields.filter((field) => !chosen.includes(field) && storedMeasure(scene, field));
  const height = opticFields.filter((field) => field.key === 'heightAboveGroundM' && !known.includes(field));
  return [
    ...[...chosen, ...known, ...height].map((field) => fieldRow(scene, field)),
    blank({ label: 'Cracks, coating, dirt; moved since?', value: scene.optic.condition ?? '', choices: ['not moved', 'moved'] }),
  ];
}

/** The fields of the measurements page on paper, in the same order. */
export function measurementSheet(scene: Scene): SheetGroup[] {
  const groups: { heading: string; rows: Omit<SheetRow, 'number'>[] }[] = [
    {
      heading: 'Place and north',
      rows: [
        blank({ label: 'Place of the optic', help: 'pin on the plan, or satellite position', unit: 'm', choices: ['pin', 'satellite'] }),
        blank({ label: 'Timed shadow of a plumb line', help: 'time to the second', unit: '°', choices: ['time:'] }),
      ],
    },
    { heading: 'Optic', rows: opticRows(scene) },
    {
      heading: 'In the path of the light',
      rows: [...openingFields.map((field) => fieldRow(scene, field)), blank({ label: 'Panes, film, blind, screen', help: 'how many, how they stood then', choices: ['blind open', 'part', 'closed', 'screen'] })],
    },
    {
      heading: 'Mark and target',
      rows: [...[...markFields, ...targetFields].map((field) => fieldRow(scene, field)), blank({ label: 'Material, colour, layers, moisture', value: scene.target.colour ?? '', choices: ['sample kept'] })],
    },
  ];
  let number = 0;
  return groups.map((group) => ({ heading: group.heading, rows: group.rows.map((row) => ({ ...row, number: (number += 1) })) }));
}

export const sheetPhotos = ['overview', 'middle', 'close', 'square-on with a scale', 'panorama of the skyline', 'label of the glass', 'clock of the panel'] as const;
export const weatherRows = ['Nearest station and distance, km', 'Cloud, oktas', 'Air temperature, °C', 'Air pressure, hPa', 'Wind, m/s'] as const;
