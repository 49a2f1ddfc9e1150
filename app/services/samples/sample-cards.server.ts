import { cardDay, dayCard, wholeCard } from '#app/domain/case-card.ts';
import type { CardCase, CardResult, CardView } from '#app/domain/case-card.ts';
import { formatClock } from '#app/domain/local-time.ts';
import { sampleCases } from '#app/domain/sample-cases.ts';
import type { SampleCase } from '#app/domain/sample-cases.ts';
import { runEngine } from '#app/jobs/engine-runner.server.ts';

export interface SampleCard {
  readonly key: SampleCase['key'];
  readonly title: string;
  readonly found: string;
  readonly sunlitMinutes: number;
  readonly small: CardView;
  readonly large: CardView;
  readonly day: string;
}

let computed: Promise<readonly SampleCard[]> | undefined;

/** Cards of the invented cases on the first page, computed once per process, off the event loop. */
export function sampleCards(): Promise<readonly SampleCard[]> {
  computed ??= Promise.all(sampleCases.map(cardOf)).catch((error: unknown) => {
    // A failed attempt is not kept, so that the next visitor gets another.
    computed = undefined;
    throw error;
  });
  return computed;
}

async function cardOf(sample: SampleCase): Promise<SampleCard> {
  const result = await runEngine(sample.input, { timeoutMs: 30_000 });
  const facts: CardCase = {
    zone: sample.input.place.zone,
    latitudeDeg: sample.latitudeDeg,
    longitudeDeg: sample.longitudeDeg,
    elevationM: sample.input.place.elevationM,
    onsetEarliestAt: new Date(sample.input.window.startUtc),
    onsetLatestAt: new Date(sample.input.window.endUtc),
    foundAt: new Date(sample.foundUtc),
    reportedAt: new Date(sample.foundUtc),
  };
  const shown: CardResult = {
    runs: result.runs,
    window: result.window,
    flux: result.minutes.flatMap((minute) => (minute.verdict === 'sunlit' && minute.fluxKwm2 !== null ? [{ atUtc: minute.atUtc, kwm2: minute.fluxKwm2 }] : [])),
  };
  return {
    key: sample.key,
    title: sample.title,
    found: sample.found,
    sunlitMinutes: result.totals.sunlit,
    small: dayCard(facts, shown, { fromHour: 4, toHour: 22 }),
    large: wholeCard(facts, shown, { start: [], end: [`${formatClock(facts.foundAt ?? facts.reportedAt, facts.zone)}, the mark was found`, 'daylight after this was not examined'] }),
    day: cardDay(facts, shown),
  };
}
