import { db } from '#db/client.server.ts';
import { casePlace } from '#db/queries/case-place.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { latestScene } from '#db/queries/scenes.server.ts';
import { runEngine } from '#app/jobs/engine-runner.server.ts';
import { runCard } from '#app/domain/case-card.ts';
import type { CardView } from '#app/domain/case-card.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { fromLocalInput, localDay } from '#app/domain/local-time.ts';
import { reconstructionInput } from '#app/domain/reconstruction-input.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';

/** Enough for the minutes of one day; fluxes are not shown from this run. */
const quick = { rays: 2_000, samples: 64 } as const;
const timeoutMs = 10_000;

/**
 * The minutes of today at the place of a case, from its latest measurements. Nothing is stored: a reconstruction that
 * counts is one that was requested and attached.
 *
 * @throws DomainError `forbidden` to those who may not run one; `invalid-input` with the engine's sentence.
 */
export async function sunToday(params: { actor: Actor; caseNumber: number; now: Date }): Promise<CardView> {
  const found = await findCase(db, params.actor, params.caseNumber);
  if (!found) throw notFound('The case');
  authorize(params.actor, 'reconstruction:run', found.subject);
  const scene = await latestScene(db, found.row.id);
  if (!scene) throw new DomainError('invalid-input', 'Measure the optic and the mark first.');
  const place = await casePlace(db, found.row);
  const [from, to] = dayOf(params.now, place.zone);
  const times = { onsetEarliestAt: from, onsetLatestAt: to, foundAt: null, foundClockErrorS: 0, foundPrecision: 'exact' };
  const { input } = reconstructionInput({ scene: scene.scene, site: place, times, seed: found.row.number, recurrenceToUtc: to.toISOString() });
  if (!input) throw new DomainError('invalid-input', 'The day cannot be worked out.');
  const result = await runEngine({ ...input, ...quick }, { timeoutMs });
  return runCard(place, { ...result, flux: [] }, params.now);
}

function dayOf(now: Date, zone: string): [Date, Date] {
  const day = localDay(now, zone);
  const at = (clock: string) => {
    const reading = fromLocalInput(`${day}T${clock}`, zone, 'first');
    return reading.kind === 'instant' ? reading.instant : now;
  };
  return [at('04:00'), at('22:00')];
}
