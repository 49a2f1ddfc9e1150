import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextArea } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { problemFields } from './problem-fields.ts';
import type { FormAnswer } from './problem-fields.ts';

export const signFormId = 'sign-form';

export interface ReviewMovesProps {
  readonly caseVersion: number;
  /** Null: the moves are the reader's to make. Otherwise who can. */
  readonly whoCan: string | null;
  readonly openComments: number;
  readonly opinionShown: boolean;
  readonly sendBackAnswer: FormAnswer | null;
  readonly signAnswer: FormAnswer | null;
}

/** Send back, or sign: for the reviewer. To everybody else they are listed with who can. */
export function ReviewMoves({ caseVersion, whoCan, openComments, opinionShown, sendBackAnswer, signAnswer }: ReviewMovesProps) {
  if (whoCan !== null) {
    return (
      <section aria-labelledby="moves">
        <SectionHeading id="moves">Moves</SectionHeading>
        <p>Send back with comments; sign and pass to action; sign, no action needed.</p>
        <p className="text-small text-second">{whoCan}</p>
      </section>
    );
  }
  const signNeeds = [...(opinionShown ? [] : ['the opinion shown and read']), ...(openComments > 0 ? [`${openComments} open ${openComments === 1 ? 'comment' : 'comments'} settled`] : []), 'each group of inputs ticked as read'];
  return (
    <section aria-labelledby="moves" className="space-y-5">
      <SectionHeading id="moves">Moves open to you</SectionHeading>
      <Form method="post" className="space-y-2">
        <input type="hidden" name="intent" value="send-back" />
        <input type="hidden" name="version" value={caseVersion} />
        <ErrorSummary errors={sendBackAnswer?.formErrors} title="Not sent back yet." />
        <TextArea field={problemFields(sendBackAnswer, {}, 'send-back-')('reason')} label="A word to the author" aside="not required" rows={2} />
        <Button look={openComments > 0 ? 'outlined' : 'waiting'} block>Send back with comments</Button>
        <p className="text-axis text-second">Needs: one comment on a field. You have {openComments} open.</p>
      </Form>
      <Form method="post" id={signFormId} className="space-y-2">
        <input type="hidden" name="intent" value="sign" />
        <input type="hidden" name="version" value={caseVersion} />
        <ErrorSummary errors={signAnswer?.formErrors} title="Not signed yet." fields={[{ field: { name: 'read', errors: signAnswer?.fieldErrors['read'] }, label: 'Inputs' }]} />
        <ChoiceChips field={problemFields(signAnswer, { after: 'action' }, 'sign-')('after')} legend="After the signature" options={[{ value: 'action', label: 'Pass to action' }, { value: 'no-action', label: 'No action needed' }]} />
        <TextArea field={problemFields(signAnswer, {}, 'sign-')('reason')} label="What the signature rests on" aside="needed without an action" rows={2} />
        <Button look={opinionShown && openComments === 0 ? 'filled' : 'waiting'} block>Sign this version</Button>
        <p className="text-axis text-second">Needs: {signNeeds.join(', ')}. Without an action the case then waits for the site manager, who closes it or passes it to action after all. The version is then frozen with a hash and cannot be changed.</p>
      </Form>
    </section>
  );
}
