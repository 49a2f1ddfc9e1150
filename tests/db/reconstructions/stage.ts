import { sceneSchema } from '#app/domain/scene.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { createCase, createHouse, createScene } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';

const m = (value: number, plusMinus: number) => ({ value, plusMinus, method: 'measured' as const });

/** An invented acrylic ball on a shelf by a window; the mark lies behind it, away from a morning sun. */
export const ballScene = sceneSchema.parse({
  optic: { kind: 'glass-ball', diameterMm: m(120, 0.5), material: 'acrylic', movedSince: 'no' },
  mark: { bearingDeg: m(330, 3), elevationDeg: m(-45, 3), distanceMm: m(91, 2), lengthMm: m(12, 1), widthMm: m(4, 1) },
  target: { material: 'wool-felt', sampleKept: 'yes' },
});

/** A window of ten minutes keeps the engine's work small. */
export const shortWindow = { onsetEarliestAt: new Date('2026-05-09T10:00:00Z'), onsetLatestAt: new Date('2026-05-09T10:10:00Z'), foundAt: new Date('2026-05-09T10:12:00Z') };

/** A plain input without an optic, for rows whose computing is not under test. */
export const plainInput: ReconstructionInput = {
  place: { latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 60, heightAboveGroundM: 0, zone: 'Europe/London' },
  window: { startUtc: '2026-05-09T10:00:00.000Z', endUtc: '2026-05-09T10:10:00.000Z', clockSigmaS: 60 },
  sky: { climateClass: 'temperate-rural' },
  seed: 7,
  recurrenceFromUtc: '2026-05-09T10:00:00.000Z',
  recurrenceToUtc: '2026-06-09T00:00:00.000Z',
};

export async function measuredCase(): Promise<{ house: House; caseId: string; caseNumber: number }> {
  const house = await createHouse();
  const row = await createCase('investigation', { site: house.site, assignedToId: house.investigator.userId, ...shortWindow });
  await createScene({ caseId: row.id, scene: ballScene });
  return { house, caseId: row.id, caseNumber: row.number };
}
