import { answerTo } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import type { NoticeView, PlanView } from '#app/domain/evidence-steps-view.ts';
import { AnswerForm, NoticeForm } from './notice-forms.tsx';
import { NoticeLog } from './notice-log.tsx';

export interface NoticeSectionProps {
  readonly notices: readonly NoticeView[];
  readonly choices: readonly { readonly id: string; readonly words: string }[];
  readonly plans: readonly PlanView[];
  readonly zone: string;
  readonly clientIds: { readonly notice: string; readonly answer: string };
  readonly mayWrite: boolean;
  readonly answer: FormAnswer | undefined;
}

/** The notice log of one item, with the forms that add to it. */
export function NoticeSection({ notices, choices, plans, zone, clientIds, mayWrite, answer }: NoticeSectionProps) {
  const answered = notices.reduce((count, notice) => count + notice.earlier.length + (notice.answer ? 1 : 0), 0);
  return (
    <div>
      <NoticeLog notices={notices} />
      {mayWrite ? (
        <div className="pt-1" data-print="no">
          <NoticeForm key={`notice-${notices.length}`} clientId={clientIds.notice} zone={zone} plans={plans} answer={answerTo(answer, 'notice')} />
          {choices.length > 0 ? <AnswerForm key={`answer-${answered}`} clientId={clientIds.answer} zone={zone} notices={choices} answer={answerTo(answer, 'answer')} /> : null}
        </div>
      ) : null}
    </div>
  );
}
