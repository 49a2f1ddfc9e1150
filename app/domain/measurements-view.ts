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

export function declinationWords(declinationDeg: number | null, source: string): string {
  if (declinationDeg === null) return `No magnetic model covers ${source}.`;
  return `Magnetic declination here today: ${declinationDeg >= 0 ? '+' : ''}${declinationDeg.toFixed(1)}° (${source}); east is added.`;
}
