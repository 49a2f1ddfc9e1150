import geomagnetism from 'geomagnetism';
import type { BearingFrames } from '#app/domain/scene-bearings.ts';

/**
 * Magnetic declination at a place on a day, by the World Magnetic Model of NOAA and BGS as the package `geomagnetism`
 * carries it. East positive: it is added to a magnetic bearing.
 *
 * @param at Day on which the compass was read.
 * @returns `declinationDeg` null outside the years that the package's models cover.
 */
export function declinationAt(place: { readonly latitudeDeg: number; readonly longitudeDeg: number; readonly elevationM: number }, at: Date): BearingFrames {
  try {
    const model = geomagnetism.model(at);
    const { decl } = model.point([place.latitudeDeg, place.longitudeDeg, place.elevationM / 1_000]);
    return { declinationDeg: Math.round(decl * 100) / 100, declinationSource: `${model.name}, ${at.toISOString().slice(0, 10)}` };
  } catch {
    // The package throws for days outside its models; that is the answer.
    return { declinationDeg: null, declinationSource: at.toISOString().slice(0, 10) };
  }
}
