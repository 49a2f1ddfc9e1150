import { formatDayClock } from './local-time.ts';
import type { ReportedResult } from './report-source.ts';
import { outcomeLabels } from './run-words.ts';

const round = (value: number): string => (Math.abs(value) >= 100 ? Math.round(value).toString() : Number(value.toPrecision(3)).toString());
const band = ({ low, high }: { readonly low: number; readonly high: number }): string => `${round(low)} to ${round(high)}`;

/** What the speed of the spot says of time, which only the length of a trail can be set against. */
export function trailWords({ focusKind, trailMinutesAtLeast }: Pick<NonNullable<ReportedResult['focus']>, 'focusKind' | 'trailMinutesAtLeast'>): string {
  if (focusKind === 'line') return 'a line focus carries no time';
  return trailMinutesAtLeast === null ? 'no length of a trail to set against it' : `the trail needs at least ${round(trailMinutesAtLeast)} min`;
}

/** The best minute and the focus there, one quantity a row: name, value, note. */
export function focusRows({ best, focus }: ReportedResult, zone: string): string[][] {
  const rows: string[][] = [];
  if (best) {
    rows.push(['Best minute', formatDayClock(new Date(best.atUtc), zone), `sun ${best.sun.apparentElevationDeg.toFixed(1)}° up, bearing ${best.sun.azimuthDeg.toFixed(1)}° from true north`]);
    if (best.dni.likelyWm2 !== null) rows.push(['Direct sunlight then', `${Math.round(best.dni.likelyWm2)} W/m²`, best.dni.basis]);
    if (best.missLateralMm !== null) rows.push(['Focus beside the mark', `${round(best.missLateralMm)} mm`, best.toleranceLateralMm === null ? '' : `may be up to ${round(best.toleranceLateralMm)} mm`]);
  }
  if (focus) {
    rows.push(['Focal length', focus.focalLengthM < 2 ? `${round(focus.focalLengthM * 1000)} mm` : `${round(focus.focalLengthM)} m`, `${focus.focusKind} focus, ${focus.method === 'ray-trace' ? 'by tracing rays' : 'closed form'}`]);
    rows.push(['Width of the spot', `${band(focus.spotDiameterMm)} mm`, '']);
    for (const disc of focus.discs) {
      const size = disc.disc === 'sun-image' ? `${round(disc.diameterMm)} mm disc, the image of the sun` : `${disc.disc} disc`;
      rows.push([`Flux on the ${size}`, `${band(disc.fluxKwm2)} kW/m²`, `middle ${round(disc.fluxKwm2.mid)}, centred on the ${disc.centre}`]);
    }
    if (focus.trailSpeedMmPerH !== null) rows.push(['Speed of the spot', `${round(focus.trailSpeedMmPerH)} mm/h`, trailWords(focus)]);
  }
  return rows;
}

/** Width and flux of the spot at some distances; at most a dozen rows, evenly chosen. */
export function spotRows({ focus }: ReportedResult): string[][] {
  const points = focus?.spotAtDistance ?? [];
  const step = Math.max(1, Math.ceil(points.length / 12));
  return points.filter((_unused, index) => index % step === 0).map((point) => [round(point.distanceM), round(point.diameterMm), round(point.fluxKwm2)]);
}

/** What the heat could do, with the source of each criterion. */
export function heatRows({ heating }: ReportedResult): string[][] {
  return (heating?.outcomes ?? []).map((outcome) => [outcomeLabels[outcome.id], outcome.answer, outcome.timeS ? band(outcome.timeS) : '', `${outcome.sentence} ${outcome.source.text}${outcome.source.verified ? '' : ' (unverified)'}`]);
}
