import { Form, href } from 'react-router';
import { BurnCard } from '#app/components/burn-card/burn-card.tsx';
import type { BurnCardModel } from '#app/components/burn-card/model.ts';
import { ClockRibbon } from '#app/components/burn-card/clock-ribbon.tsx';
import { Select } from '#app/components/forms/text-field.tsx';
import { OpticDrawing } from '#app/components/optics/optic-drawing.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { StateMark } from '#app/components/ui/state-mark.tsx';
import type { SimilarCaseView, TriageView, WaitingCaseView } from '#app/domain/case-view.ts';
import { formFields } from './form-fields.ts';
import type { RefusedForm } from './form-fields.ts';
import { opticDrawingOf } from './optic-of.ts';
import { Refusal } from './refusal.tsx';

/** First line of the page: whether somebody has to act before anything is decided. */
export function HazardLine({ hazard, hurtWords }: Pick<TriageView, 'hazard' | 'hurtWords'>) {
  return (
    <div role="note" className="border-l-6 border-ink py-1 pl-4">
      <p><span className="font-semibold">Hazard still there: {hazard.answer}.</span> {hazard.words}</p>
      {hurtWords ? <p className="pt-1">{hurtWords}</p> : null}
    </div>
  );
}

export interface SunOnItProps {
  readonly sun: TriageView['sun'];
  /** Today's minutes, when they were asked for. */
  readonly workedOut: BurnCardModel | null;
  readonly workOutHref: string;
}

/** Is the sun on it now, and when next; with the card of today. */
export function SunOnIt({ sun, workedOut, workOutHref }: SunOnItProps) {
  return (
    <section aria-labelledby="sun-heading" id="sun">
      <SectionHeading id="sun-heading" note={workedOut ? 'worked out just now from the latest measurements, not stored' : sun.basis}>Is the sun on it now?</SectionHeading>
      <p className="pb-1 text-account"><span className="font-semibold">{workedOut ? todayWords(workedOut) : sun.words}</span> {sun.skyWords}</p>
      <BurnCard model={workedOut ?? sun.card} size="L" label="Today" />
      {sun.mayWorkOut && !workedOut ? <p><AppLink href={workOutHref} className="inline-flex min-h-11 items-center">Work out today's minutes</AppLink></p> : null}
      <p className="pt-1 text-small text-second">Nobody needs to look to check this. Work it out from the mark and the geometry.</p>
    </section>
  );
}

function todayWords(model: BurnCardModel): string {
  const now = model.cursorUtc ?? '';
  const atNow = model.runs.find((run) => run.fromUtc <= now && now < run.toUtc);
  if (atNow?.verdict === 'sunlit') return 'On it now, if the sky is clear.';
  const present = atNow?.verdict === 'cannot-tell' ? 'It cannot be told whether it is on it now.' : 'Not on it now.';
  const later = model.runs.filter((run) => run.fromUtc > now);
  if (later.some((run) => run.verdict === 'sunlit')) return `${present} It comes later today, if the sky is clear.`;
  return later.some((run) => run.verdict === 'cannot-tell') ? `${present} For some minutes later today it cannot be told.` : `${present} It does not come any more today.`;
}

export function SimilarCases({ similar }: { readonly similar: readonly SimilarCaseView[] }) {
  return (
    <section aria-labelledby="similar-heading">
      <SectionHeading id="similar-heading" note="by place, optic, bearing and sun days; what is shared stands beside each">Similar cases</SectionHeading>
      {similar.length === 0 ? <p className="text-second">None among the cases that you may see.</p> : (
        <ul>
          {similar.map(({ row, reasons }) => (
            <li key={row.number} className="grid grid-cols-[2.75rem_2.75rem_minmax(0,1fr)] items-start gap-x-3 border-b border-hair py-1.5 tablet:grid-cols-[2.75rem_2.75rem_minmax(0,1.3fr)_minmax(0,1fr)_minmax(0,1.2fr)]">
              <span className="font-serif text-group text-second">{row.number}</span>
              <OpticDrawing kind={opticDrawingOf(row.opticKind)} width={40} named />
              <span>
                <AppLink href={href('/cases/:caseNumber', { caseNumber: String(row.number) })} className="font-semibold no-underline hover:underline">{row.title}</AppLink>
                <span className="block text-axis text-second">{row.place}</span>
              </span>
              <span className="text-small max-tablet:col-span-3">
                {reasons.join(', ')}
                <span className="block text-axis"><StateMark state={row.state} note={row.stateNote} /></span>
              </span>
              <span className="max-tablet:col-span-3"><BurnCard model={row.card} size="S" label={`Case ${row.number}`} /></span>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

const groupWords = { hazard: 'Hazard or injury, one hour', 'first-look': 'First look, four working hours', reporter: 'Waiting for the reporter' } as const;

/** What else waits, soonest first. */
export function WaitingList({ waiting, current, nowUtc }: { readonly waiting: readonly WaitingCaseView[]; readonly current: number; readonly nowUtc: string }) {
  const groups = (['hazard', 'first-look', 'reporter'] as const).map((group) => ({ group, cases: waiting.filter((one) => one.group === group) })).filter((one) => one.cases.length > 0);
  return (
    <nav aria-label="Waiting for a look">
      <h2 className="text-group font-semibold">Waiting for a look <span className="font-normal text-second">{waiting.length}</span></h2>
      {groups.map(({ group, cases }) => (
        <div key={group} className="pt-2">
          <h3 className="border-b-[1.5px] border-ink pb-0.5 font-serif text-group">{groupWords[group]}</h3>
          <ul>
            {cases.map((one) => (
              <li key={one.number} className={`border-b border-hair ${one.number === current ? 'border-l-4 border-l-ink bg-wash pl-2' : ''}`}>
                <AppLink href={`${href('/cases/:caseNumber', { caseNumber: String(one.number) })}/triage`} className="block py-1.5 no-underline hover:underline" {...(one.number === current ? { 'aria-current': 'page' as const } : {})}>
                  <span className="font-serif text-second">{one.number}</span> <span className="font-medium">{one.title}</span>
                  <span className="block text-axis text-second">{one.place}</span>
                  {one.firstLook ? <ClockRibbon fromUtc={one.firstLook.reportedUtc} toUtc={one.firstLook.late ? nowUtc : one.firstLook.dueUtc} nowUtc={nowUtc} dueUtc={one.firstLook.dueUtc} label={`First look, case ${one.number}`} /> : null}
                  <span className={`block text-axis ${one.firstLook?.late ? 'font-semibold' : 'text-second'}`}>{one.clockWords}</span>
                </AppLink>
              </li>
            ))}
          </ul>
        </div>
      ))}
      <p className="pt-3 text-axis text-second">Blue: now. Dark: time left. Diamond: due. Dashes: late. Working hours are 09:00 to 17:00 of the place, Monday to Friday; the clock of one hour never stops. The hours are our own default.</p>
    </nav>
  );
}

export interface AssignFormProps {
  readonly investigators: NonNullable<TriageView['investigators']>;
  readonly investigatorId: string;
  readonly version: number;
  readonly problem: RefusedForm | undefined;
}

export function AssignForm({ investigators, investigatorId, version, problem }: AssignFormProps) {
  const { field, refused } = formFields('assign', problem);
  return (
    <Form method="post" className="space-y-2 border-b border-hair pb-4" preventScrollReset>
      <Refusal refused={refused} />
      <input type="hidden" name="intent" value="assign" />
      <input type="hidden" name="version" value={version} />
      <Select field={field('investigatorId', investigatorId)} label="Investigator" emptyLabel={investigators.length === 0 ? 'Nobody holds this role here' : 'Choose'} options={investigators.map((person) => ({ value: person.userId, label: person.name }))} />
      <Button look="outlined" block>Name the investigator</Button>
    </Form>
  );
}
