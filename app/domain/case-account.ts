import type { FactView, LackView } from './case-view.ts';
import type { MoveFacts } from './case-state.ts';
import { longWindowDays } from './case-facts.ts';
import type { Extent, FoundPrecision, OnsetBasis, WeatherSeen, YesNoUnknown, foundMeans } from './incident.ts';
import { extentLabels, foundMeansLabels, foundPrecisionLabels, isRisk, onsetBasisLabels, riskLabels, weatherSeenLabels } from './incident.ts';
import { formatClock, formatDayClock } from './local-time.ts';
import type { Measured, Scene } from './scene.ts';
import { measureMethodLabels, sceneOpticLabels, targetMaterialLabels } from './scene.ts';

export interface FactSource {
  readonly zone: string;
  readonly foundAt: Date | null;
  readonly correctedFoundAt: Date | null;
  readonly foundPrecision: FoundPrecision;
  readonly foundClockErrorS: number;
  readonly foundByMeans: (typeof foundMeans)[number] | null;
  readonly onsetEarliestAt: Date | null;
  readonly onsetLatestAt: Date | null;
  readonly onsetBasis: OnsetBasis | null;
  readonly extent: Extent | null;
  readonly weatherSeen: WeatherSeen | null;
  readonly hazardStillPresent: YesNoUnknown;
  readonly interimControl: string | null;
  readonly interimControlAt: Date | null;
  readonly interimControlEnds: string | null;
  readonly risk: string | null;
  readonly riskBasis: string | null;
  readonly investigatorName: string | null;
  readonly scene: Scene | null;
}

const unknown = 'not known';

/** The facts list of a case, in the order in which a person asks. */
export function caseFactList(source: FactSource): FactView[] {
  const { zone } = source;
  const at = (instant: Date | null) => (instant ? formatDayClock(instant, zone) : unknown);
  const fact = (term: string, value: string, note: string | null = null): FactView => ({ term, value, note });
  return [
    fact('Last seen sound', at(source.onsetEarliestAt), source.onsetBasis ? onsetBasisLabels[source.onsetBasis].toLowerCase() : null),
    fact('Latest possible onset', at(source.onsetLatestAt)),
    foundFact(source),
    fact('Window examined', windowLength(source)),
    fact('Found by', source.foundByMeans ? foundMeansLabels[source.foundByMeans] : unknown),
    opticFact(source.scene),
    markFact(source.scene),
    fact('Extent', source.extent ? extentLabels[source.extent] : unknown),
    fact('Weather seen', source.weatherSeen ? weatherSeenLabels[source.weatherSeen] : unknown),
    fact('Hazard still there', hazardWords(source.hazardStillPresent)),
    fact('Interim control', source.interimControl ?? 'none recorded', source.interimControl ? [source.interimControlAt ? `since ${at(source.interimControlAt)}` : '', source.interimControlEnds ? `until ${source.interimControlEnds}` : 'no end condition'].filter(Boolean).join(', ') : null),
    fact('Risk if nothing is done', isRisk(source.risk) ? riskLabels[source.risk] : 'not stated', source.riskBasis),
    fact('Investigator', source.investigatorName ?? 'not named'),
  ];
}

const hazardWords = (answer: YesNoUnknown) => (answer === 'dont-know' ? unknown : answer);

function foundFact(source: FactSource): FactView {
  const { foundAt, correctedFoundAt, zone, foundPrecision } = source;
  if (!foundAt) return { term: 'Found', value: unknown, note: null };
  if (!correctedFoundAt) return { term: 'Found', value: formatDayClock(foundAt, zone), note: foundPrecisionLabels[foundPrecision].toLowerCase() };
  const errorMin = source.foundClockErrorS / 60;
  const raw = source.foundClockErrorS === 0 ? foundPrecisionLabels[foundPrecision].toLowerCase() : `read ${formatClock(foundAt, zone)}, clock ${Math.abs(Math.round(errorMin * 10) / 10)} min ${errorMin > 0 ? 'fast' : 'slow'}`;
  return { term: 'Found', value: formatDayClock(correctedFoundAt, zone), note: raw };
}

function windowLength({ onsetEarliestAt, onsetLatestAt }: FactSource): string {
  if (!onsetEarliestAt || !onsetLatestAt) return 'no window given';
  const minutes = Math.round((onsetLatestAt.getTime() - onsetEarliestAt.getTime()) / 60_000);
  const [days, hours, rest] = [Math.floor(minutes / 1_440), Math.floor((minutes % 1_440) / 60), minutes % 60];
  return [days ? `${days} d` : '', hours ? `${hours} h` : '', rest || minutes === 0 ? `${rest} min` : ''].filter(Boolean).join(' ');
}

const measuredWords = (value: Measured, unit: string) => `${value.value}${value.plusMinus === undefined ? '' : ` ± ${value.plusMinus}`} ${unit}`;

function opticFact(scene: Scene | null): FactView {
  const optic = scene?.optic;
  if (!optic || optic.kind === 'dont-know') return { term: 'Optic', value: unknown, note: null };
  const size = optic.diameterMm ?? optic.widthMm ?? optic.paneWidthMm;
  const value = [sceneOpticLabels[optic.kind], size ? measuredWords(size, 'mm') : ''].filter(Boolean).join(', ');
  const moved = optic.movedSince === 'yes' ? 'moved since' : optic.movedSince === 'no' ? 'as it stood' : null;
  return { term: 'Optic', value, note: [size ? measureMethodLabels[size.method].toLowerCase() : null, moved].filter(Boolean).join(', ') || null };
}

function markFact(scene: Scene | null): FactView {
  const material = scene && scene.target.material !== 'dont-know' ? targetMaterialLabels[scene.target.material] : '';
  const { lengthMm, widthMm } = scene?.mark ?? {};
  const size = lengthMm && widthMm ? `${lengthMm.value} × ${widthMm.value} mm` : lengthMm ? measuredWords(lengthMm, 'mm') : '';
  return { term: 'Mark', value: [material, size].filter(Boolean).join(', ') || unknown, note: null };
}

/** What is odd about the window, said at once. */
export function windowWarnings(source: { readonly onsetEarliestAt: Date | null; readonly onsetLatestAt: Date | null; readonly daylightInWindow: boolean }): string[] {
  const { onsetEarliestAt, onsetLatestAt } = source;
  if (!onsetEarliestAt || !onsetLatestAt) return [];
  const days = (onsetLatestAt.getTime() - onsetEarliestAt.getTime()) / 86_400_000;
  return [
    ...(days > longWindowDays ? [`The onset window is ${Math.round(days)} days long. The longer it is, the less the sun's path can tell; see whether somebody saw the place sound later.`] : []),
    ...(source.daylightInWindow ? [] : ['There is no daylight inside the onset window. Check both times, the clock, and the day.']),
  ];
}

export interface LackSource {
  readonly scene: Scene | null;
  readonly siteSkyline: boolean;
  readonly facts: MoveFacts;
  readonly onsetBasis: string | null;
  readonly interimControl: string | null;
  readonly interimControlEnds: string | null;
  readonly hazardStillPresent: YesNoUnknown;
  readonly actionCount: number;
  readonly effectChecksPlanned: number;
  readonly signed: boolean;
  readonly releases: number;
  readonly photosDecided: number;
}

/** What the next person still lacks, by reader, so that the hand-over does not stall. */
export function whatIsLacking(source: LackSource): LackView[] {
  const { scene, facts } = source;
  const item = (done: boolean, label: string) => ({ done, label });
  const bearing = scene?.mark.bearingDeg;
  return [
    {
      reader: 'Technical reviewer',
      items: [
        item(bearing !== undefined && bearing.method !== 'assumed', bearing ? `Bearing of the mark, ${measureMethodLabels[bearing.method].toLowerCase()}` : 'Bearing of the mark and how it was taken'),
        item(source.onsetBasis !== null && facts.onsetEarliestAt !== null, 'Onset window and its basis'),
        item(scene?.skyline !== undefined || source.siteSkyline, scene?.skyline ? `Skyline, ${scene.skyline.points.length} points` : 'Skyline'),
        item(scene?.air.dni !== undefined, 'Sun strength measured in the window'),
        item(facts.alternativesExamined >= 2, `Alternatives examined, ${facts.alternativesExamined} of 2`),
      ],
    },
    {
      reader: 'Site manager, for action',
      items: [
        item(source.hazardStillPresent !== 'yes' || source.interimControl !== null, 'Interim control'),
        item(source.interimControl === null || source.interimControlEnds !== null, 'When the interim control may go'),
        item(facts.risk !== null, 'Risk if nothing is done'),
        item(source.actionCount > 0, source.actionCount > 0 ? `Actions, ${source.actionCount}` : 'An action with an owner'),
        item(source.effectChecksPlanned > 0, 'A day to see whether the fix works'),
      ],
    },
    {
      reader: 'Insurer reader',
      items: [
        item(source.signed, source.signed ? 'Signed finding' : 'Signed finding, not before review'),
        item(source.photosDecided > 0, 'Photos decided for release'),
        item(source.releases > 0, source.releases > 0 ? `Releases, ${source.releases}` : 'A release, not started'),
      ],
    },
  ];
}
