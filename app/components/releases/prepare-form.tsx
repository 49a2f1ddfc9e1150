import { Form, href } from 'react-router';
import { formFields } from '#app/components/cases/form-fields.ts';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { Columns } from '#app/components/layout/page.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { Tabs } from '#app/components/ui/tabs.tsx';
import type { PhotoMask } from '#app/domain/photo.ts';
import type { LineDecision } from '#app/domain/redaction.ts';
import type { MarkedPiece } from '#app/domain/redact-text.ts';
import { decisionField } from '#app/domain/release-form.ts';
import { audienceLabels, audienceMeanings, audiences } from '#app/domain/release-policy.ts';
import type { Audience } from '#app/domain/release-policy.ts';
import type { WithheldLine } from '#app/domain/release-view.ts';
import { LineRow, PhotoRow } from './decision-row.tsx';
import { WithheldCounts } from './withheld-counts.tsx';

export interface PrepareFormProps {
  readonly desk: {
    readonly caseNumber: number;
    readonly zone: string;
    readonly audience: Audience;
    readonly lines: readonly { readonly key: string; readonly label: string; readonly pieces: readonly MarkedPiece[]; readonly decision: LineDecision | null }[];
    readonly photos: readonly { readonly key: string; readonly photoId: string; readonly label: number; readonly viewWords: string; readonly alternative: string; readonly masks: readonly PhotoMask[]; readonly releasable: 'undecided' | 'yes' | 'no'; readonly decision: LineDecision | null }[];
    readonly recipients: readonly { readonly id: string; readonly name: string; readonly readers: number }[];
    readonly expiry: { readonly first: string; readonly proposed: string; readonly last: string };
    readonly basis: string;
    readonly withheld: readonly WithheldLine[];
    readonly namesHeld: number;
    readonly namesLikeWords: readonly string[];
  };
  readonly problem: RefusedForm | undefined;
}

const asDecision = (value: string | undefined): LineDecision | null => (value === 'share' || value === 'hold-back' ? value : null);

/** The page on which one person decides line by line what leaves. Works without a script. */
export function PrepareForm({ desk, problem }: PrepareFormProps) {
  const { field, refused } = formFields('prepare', problem);
  const chosen = (key: string, before: LineDecision | null) => (refused ? asDecision(refused.typed[decisionField(key)]) : before);
  const base = href('/cases/:caseNumber/releases', { caseNumber: String(desk.caseNumber) });
  const recipient = field('recipientOrganisationId', desk.recipients.length === 1 ? desk.recipients[0]?.id : null);
  const expires = field('expiresOn', desk.expiry.proposed);
  const note = field('changeNote');
  const side = (
    <div className="space-y-6">
      <section aria-labelledby="so-far-heading">
        <h3 id="so-far-heading" className="border-b-[1.5px] border-ink pb-1 font-semibold">Withheld, as this page opened</h3>
        <WithheldCounts lines={desk.withheld} />
        <p className="pt-2 text-axis text-second">The reader sees these counts and classes, not the words. Text is searched for {desk.namesHeld} names that the case and the organisation hold.</p>
      </section>
      <section aria-labelledby="who-heading" className="space-y-3">
        <h3 id="who-heading" className="border-b-[1.5px] border-ink pb-1 font-semibold">Who reads it, and how long</h3>
        <Select field={recipient} label="For" emptyLabel="Choose an organisation" options={desk.recipients.map((one) => ({ value: one.id, label: `${one.name}, ${one.readers === 1 ? '1 reader' : `${one.readers} readers`}` }))} />
        <TextInput field={expires} label="Ends on" type="date" min={desk.expiry.first} max={desk.expiry.last} help={`End of the day, ${desk.zone.replaceAll('_', ' ')}.`} />
        <TextInput field={note} label="What is new in it" maxLength={300} help="Goes out as it stands: no names, no contacts, no health matters." />
        <Button block>Prepare the release</Button>
        <p className="text-axis text-second">It gets a number and stays in the house. A second person, who cannot be you, reads it as its reader will and approves it. Then it is frozen: a changed case needs the next number.</p>
      </section>
    </div>
  );
  return (
    <section aria-labelledby="prepare-heading" className="pt-8">
      <SectionHeading id="prepare-heading" note="source, as written, is never changed">Prepare the next release</SectionHeading>
      <Tabs label="Reader of the release" look="filter" items={audiences.map((one) => ({ href: `${base}?for=${one}`, label: audienceLabels[one], current: one === desk.audience }))} />
      <p className="py-3 text-second">{audienceMeanings[desk.audience]} What is not decided is held back, and new fields stay out unless put in.</p>
      {desk.namesLikeWords.length > 0 ? <div className="pb-3"><Notice role="note" title="Names that are also words">{`Found only where they begin with a capital, so read the lines for them: ${desk.namesLikeWords.join(', ')}.`}</Notice></div> : null}
      <Form method="post" action={`${base}?for=${desk.audience}`}>
        <input type="hidden" name="intent" value="prepare" />
        <input type="hidden" name="audience" value={desk.audience} />
        <input type="hidden" name="basis" value={desk.basis} />
        {refused ? <div className="pb-4"><ErrorSummary errors={refused.formErrors} fields={[{ field: recipient, label: 'For' }, { field: expires, label: 'Ends on' }, { field: note, label: 'What is new in it' }]} title="Not prepared yet. Your decisions are still here." /></div> : null}
        <Columns side={side} sideLabel="Reader, end and counts">
          <ol className="border-t-[1.5px] border-ink">
            {desk.lines.map((line, index) => <LineRow key={line.key} number={index + 1} label={line.label} fieldKey={line.key} pieces={line.pieces} chosen={chosen(line.key, line.decision)} />)}
            {desk.photos.map(({ key, decision, ...photo }, index) => (
              <PhotoRow key={key} {...photo} fieldKey={key} number={desk.lines.length + index + 1} chosen={chosen(key, decision)} sheetHref={href('/cases/:caseNumber/photos', { caseNumber: String(desk.caseNumber) })} />
            ))}
          </ol>
        </Columns>
      </Form>
    </section>
  );
}
