import { formatIsoDay } from './local-time.ts';
import type { Measured, Scene, SceneSkyline } from './scene.ts';
import { readingWords } from './scene-bearings.ts';
import { allSceneFields, fieldName } from './scene-fields.ts';
import { storedMeasure } from './scene-form-fields.ts';

/** "Maren Kvist, 4 Feb 2026; read 331.7° magnetic, +4.9° added, WMM-2025, 2026-02-04" */
export function stampWords(measure: Measured): string {
  const who = [measure.by, measure.on ? formatIsoDay(measure.on) : ''].filter(Boolean).join(', ');
  return [who, readingWords(measure)].filter(Boolean).join('; ');
}

/** Who and when of each stored number, by field name. */
export function sceneStamps(scene: Scene): Record<string, string> {
  const stamps: Record<string, string> = {};
  for (const field of allSceneFields) {
    const measure = storedMeasure(scene, field);
    const words = measure ? stampWords(measure) : '';
    if (words) stamps[fieldName(field)] = words;
  }
  return stamps;
}

/** Whose skyline a run would use, as a sentence. */
export function skylineWords(own: SceneSkyline | undefined, site: SceneSkyline | null): string {
  if (own && own.points.length > 0) return `Skyline measured for this case: ${own.points.length} points ±${own.plusMinusDeg}°.`;
  if (site && site.points.length > 0) return `The skyline of the site is used: ${site.points.length} points ±${site.plusMinusDeg}°.`;
  return 'No skyline is measured: nothing is said about what stands in front of the sun.';
}

/** The same as a heading and what it means. */
export function skylineFinding(own: SceneSkyline | undefined, site: SceneSkyline | null): { readonly heading: string; readonly words: string } {
  if (own && own.points.length > 0) return { heading: `${own.points.length} points of skyline, measured for this case`, words: `The widest is ±${own.plusMinusDeg}°. A run goes by these.` };
  if (site && site.points.length > 0) return { heading: `The skyline of the site is used: ${site.points.length} points`, words: `The widest is ±${site.plusMinusDeg}°. A run goes by these until the case has points of its own.` };
  return { heading: 'No skyline is measured', words: 'Nothing is said about what stands in front of the sun: a run takes a level horizon. Read a clinometer, or trace a photo taken from the place of the optic.' };
}

/** How much of the scene is measured, as the finding of its page. */
export function measuredHeading(scene: Scene): string {
  const measures = allSceneFields.flatMap((field) => storedMeasure(scene, field) ?? []);
  if (measures.length === 0) return 'Nothing is measured yet';
  const weak = measures.filter((measure) => measure.method === 'assumed' || measure.method === 'estimated').length;
  const known = measures.length === 1 ? 'One value is' : `${measures.length} values are`;
  if (weak === 0) return `${known} on record, none of them assumed`;
  return `${known} on record, ${weak === measures.length ? 'all' : weak === 1 ? 'one' : weak} of them assumed or estimated`;
}

const signed = (value: number) => `${value < 0 ? '−' : '+'}${Math.abs(value).toFixed(1)}`;

/** @param source model and day, as `declinationAt` gives them: "WMM-2025, 2026-02-04". */
export function declinationWords(declinationDeg: number | null, source: string): string {
  const named = source.replace(/\d{4}-\d{2}-\d{2}/u, formatIsoDay);
  if (declinationDeg === null) return `No magnetic model covers ${named}.`;
  return `Magnetic declination here today: ${signed(declinationDeg)}° (${named}); east is added.`;
}
