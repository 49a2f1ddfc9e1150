import { Form } from 'react-router';
import { TextArea } from '#app/components/forms/text-field.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Hatch } from '#app/components/ui/hatch.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { TickLine } from '#app/components/ui/tick-line.tsx';
import type { CaseAccountView, LackView, LogLineView, PersonView, PhotoStripView } from '#app/domain/case-view.ts';
import { formFields } from './form-fields.ts';
import type { RefusedForm } from './form-fields.ts';
import { Refusal } from './refusal.tsx';

/** The reporter's words, in serif as written. */
export function AccountText({ account }: { readonly account: Pick<CaseAccountView, 'narrative' | 'sentWords' | 'question'> }) {
  return (
    <section aria-labelledby="account-heading">
      <h2 id="account-heading" className="pb-1 text-group font-semibold">Account</h2>
      <div className="max-w-[64ch] font-serif text-account whitespace-pre-line">{account.narrative || <span className="text-second">No words were written.</span>}</div>
      <p className="pt-2 text-small text-second">{account.sentWords}</p>
      {account.question ? (
        <div className="mt-3 max-w-[64ch] border-l-4 border-ink pl-3">
          <p><span className="font-semibold">Asked:</span> {account.question.question}</p>
          <p>{account.question.answer ? <><span className="font-semibold">Answer:</span> {account.question.answer}</> : <span className="text-second">Not answered yet{account.question.dueWords ? `, wanted until ${account.question.dueWords}` : ''}.</span>}</p>
        </div>
      ) : null}
    </section>
  );
}

export function Notes({ account, problem }: { readonly account: CaseAccountView; readonly problem: RefusedForm | undefined }) {
  const { field, refused } = formFields('add-note', problem);
  if (account.notes.length === 0 && !account.mayAddNote) return null;
  return (
    <section aria-labelledby="notes-heading" className="max-w-[64ch]">
      <h2 id="notes-heading" className="pb-1 text-group font-semibold">Notes {account.notes.length > 0 ? account.notes.length : ''}</h2>
      <ol>
        {account.notes.map((note) => (
          <li key={note.id} className="border-b border-hair py-2">
            <p className="whitespace-pre-line">{note.body}</p>
            <p className="text-axis text-second">{note.meta}</p>
          </li>
        ))}
      </ol>
      {account.mayAddNote ? (
        <details open={refused !== undefined} className="pt-1">
          <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">Add a note</summary>
          <Form method="post" className="space-y-3 pt-1" preventScrollReset>
            <Refusal refused={refused} />
            <input type="hidden" name="intent" value="add-note" />
            <TextArea field={field('body')} label="Note" help="Injury details go in the injury box, not here." rows={3} required maxLength={4_000} />
            <Button look="outlined">Add the note</Button>
          </Form>
        </details>
      ) : null}
    </section>
  );
}

export function PhotoStrip({ photos, count, casePath }: { readonly photos: readonly PhotoStripView[]; readonly count: number; readonly casePath: string }) {
  return (
    <section aria-labelledby="photos-heading">
      <SectionHeading id="photos-heading" note={count > 0 ? `${photos.length} of ${count}, view copies` : undefined} aside={<AppLink href={`${casePath}/photos`} className="inline-flex min-h-(--target-height) items-center text-small">All photos and checks</AppLink>}>Photos</SectionHeading>
      {count === 0 ? <p className="text-second">None yet.</p> : (
        <ul className="grid grid-cols-2 gap-4 tablet:grid-cols-4">
          {photos.map((photo) => (
            <li key={photo.id}>
              {photo.ready ? (
                <a href={`/photos/${photo.id}/view`} className="block"><img src={`/photos/${photo.id}/thumbnail`} alt={photo.altText} loading="lazy" className="aspect-[4/3] w-full bg-wash object-cover" /></a>
              ) : <div className="flex aspect-[4/3] items-center justify-center bg-wash p-2 text-center text-small text-second">The view copy is being prepared.</div>}
              <p className="pt-1 text-small font-semibold">{photo.label}</p>
              <p className="text-axis text-second">{photo.caption}</p>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

export function People({ people }: { readonly people: readonly PersonView[] | null }) {
  if (people === null) return <section><SectionHeading>People</SectionHeading><p><Hatch withheld="personal" /> <span className="text-small text-second">Open to those who work on the case.</span></p></section>;
  if (people.length === 0) return null;
  return (
    <section aria-labelledby="people-heading">
      <SectionHeading id="people-heading" note="kept apart from the account">People</SectionHeading>
      <ul>
        {people.map((person) => (
          <li key={person.id} className="flex flex-wrap gap-x-4 border-b border-hair py-1.5">
            <span className="w-32 text-second">{person.role}</span>
            <span>{person.withheld ? <Hatch withheld={person.withheld} /> : <>{person.name}{person.contact ? `, ${person.contact}` : ''}{person.note ? <span className="text-second">, {person.note}</span> : null}</>}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}

export function Lacks({ lacks }: { readonly lacks: readonly LackView[] }) {
  return (
    <section aria-labelledby="lacks-heading">
      <SectionHeading id="lacks-heading" note="so that the hand-over does not stall">What the next person still lacks</SectionHeading>
      <div className="grid gap-x-7 gap-y-4 tablet:grid-cols-3">
        {lacks.map((lack) => (
          <div key={lack.reader}>
            <h3 className="border-b border-hair pb-1 font-serif text-group">{lack.reader}</h3>
            {lack.items.map((item) => <TickLine key={item.label} done={item.done}>{item.label}</TickLine>)}
          </div>
        ))}
      </div>
    </section>
  );
}

export function LogLines({ lines }: { readonly lines: readonly LogLineView[] }) {
  return (
    <ol>
      {lines.map((line) => (
        <li key={line.sequence} className="border-b border-hair py-1.5 text-small">
          <span className="block text-axis text-second">{line.atWords}, {line.actorName}</span>
          {line.summary}
          {line.reason ? <span className="block text-second">“{line.reason}”</span> : null}
        </li>
      ))}
    </ol>
  );
}
