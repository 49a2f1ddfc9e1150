import { BurnCard } from '#app/components/burn-card/burn-card.tsx';
import type { BurnCardModel } from '#app/components/burn-card/model.ts';
import type { SiteChoice } from './where-question.tsx';

/** What the form says of times at the moment, as typed. */
export interface FoundAnswerTyped {
  readonly foundWhen: string;
  readonly foundNowAt: string;
  readonly foundLocal: string;
  readonly foundFromLocal: string;
  readonly foundToLocal: string;
  readonly lastSoundLocal: string;
}

/**
 * Today at the place: the daylight, and where in it the mark was found. Nothing is examined yet, so the stretch since it
 * was last seen sound is dots. Null when the answer is about another day.
 */
export function foundCardModel(site: SiteChoice, typed: FoundAnswerTyped): BurnCardModel | null {
  const { today, zone, nowLocal, nowUtc } = site;
  if (!today) return null;
  // Within one day of one place, clock time and instant differ by the same amount, except on the two days of a change.
  const instantOf = (local: string) => (local.slice(0, 10) === nowLocal.slice(0, 10) ? new Date(Date.parse(nowUtc) + Date.parse(`${local}Z`) - Date.parse(`${nowLocal}Z`)).toISOString() : null);
  const foundLocal = typed.foundWhen === 'at' ? typed.foundLocal : typed.foundWhen === 'range' ? typed.foundToLocal : '';
  const foundAtUtc = typed.foundWhen === 'just-now' ? typed.foundNowAt || nowUtc : foundLocal ? instantOf(foundLocal) : null;
  if (foundLocal && !foundAtUtc) return null;
  const soundLocal = typed.foundWhen === 'range' ? typed.foundFromLocal : typed.lastSoundLocal;
  const soundUtc = soundLocal ? instantOf(soundLocal) : null;
  const window = soundUtc && foundAtUtc && soundUtc < foundAtUtc ? { startUtc: soundUtc, endUtc: foundAtUtc } : null;
  return {
    zone,
    fromUtc: today.fromUtc,
    toUtc: today.toUtc,
    daylight: today.riseUtc && today.setUtc ? [{ riseUtc: today.riseUtc, setUtc: today.setUtc }] : [],
    polar: today.polar,
    window,
    runs: window ? [{ fromUtc: window.startUtc, toUtc: window.endUtc, verdict: 'cannot-tell', reasonWords: 'nothing measured yet' }] : [],
    foundAtUtc,
  };
}

export function FoundCard({ site, typed }: { readonly site: SiteChoice; readonly typed: FoundAnswerTyped }) {
  const model = foundCardModel(site, typed);
  if (!model) return null;
  return (
    <div>
      <BurnCard model={model} size="M" label="Today at the place" />
      <p className="text-axis text-second">{site.today?.words}{model.window ? ' Dots: since it was last seen sound; nothing is measured yet.' : ''}</p>
    </div>
  );
}
