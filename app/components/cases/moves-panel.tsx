import { Form } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { TickLine } from '#app/components/ui/tick-line.tsx';
import type { CaseMovesView } from '#app/domain/case-view.ts';
import { fieldOfNeed } from '#app/domain/move-checklist.ts';
import { formFields } from './form-fields.ts';
import type { RefusedForm } from './form-fields.ts';
import { MoveFields } from './move-fields.tsx';
import type { MainCaseOption } from './move-fields.tsx';
import { Refusal } from './refusal.tsx';

export interface MovesPanelProps {
  readonly moves: CaseMovesView;
  readonly version: number;
  /** Path of the case, `/cases/118`. */
  readonly casePath: string;
  /** Where this panel stands: moves that belong elsewhere become links. */
  readonly here: 'account' | 'triage';
  readonly problem: RefusedForm | undefined;
  readonly proposedDay?: string;
  readonly mainCases?: readonly MainCaseOption[];
}

type OpenMove = CaseMovesView['open'][number];
const linkWords = { triage: ', on the first-look page', findings: ', on the findings page', here: '' } as const;

/** Moves open to this person, each with what it needs, and the others with who can make them. */
export function MovesPanel(props: MovesPanelProps) {
  const { moves } = props;
  return (
    <section aria-labelledby="moves-heading">
      <h2 id="moves-heading" className="text-group font-semibold">Moves open to you</h2>
      {moves.open.length === 0 ? <p className="py-1 text-small text-second">None from this state; the next step is with somebody else.</p> : <p className="pb-1 text-small text-second">Each one writes a line in the log.</p>}
      {moves.open.map((move, index) => <OneMove key={move.id} move={move} first={index === 0} {...props} />)}
      {moves.closed.length > 0 ? (
        <div className="pt-3">
          <h3 className="text-small font-semibold">Not yours to make</h3>
          <ul>
            {moves.closed.map((move) => (
              <li key={move.id} className="border-b border-hair py-1.5">
                <span className="text-second">{move.label}</span>
                <span className="block text-axis text-second">{move.whoCan}</span>
              </li>
            ))}
          </ul>
        </div>
      ) : null}
    </section>
  );
}

function isElsewhere(move: OpenMove, here: MovesPanelProps['here']): boolean {
  if (move.place === 'findings') return true;
  return move.place === 'triage' && here === 'account' && move.id !== 'open-triage';
}

function OneMove({ move, first, here, casePath, version, problem, proposedDay, mainCases }: MovesPanelProps & { readonly move: OpenMove; readonly first: boolean }) {
  const intent = `move-${move.id}`;
  const { field: plainField, refused } = formFields(intent, problem);
  const field: typeof plainField = (name, stored) => {
    const needed = refused?.formErrors.filter((sentence) => fieldOfNeed(move.id, sentence) === name) ?? [];
    const own = plainField(name, stored);
    return needed.length > 0 ? { ...own, errors: [...(own.errors ?? []), ...needed] } : own;
  };
  const needs = move.needs.length > 0 ? <div className="pb-1 text-small">{move.needs.map((need) => <TickLine key={need.label} done={need.done}>{need.label}</TickLine>)}</div> : null;
  if (isElsewhere(move, here)) {
    return (
      <div className="border-b border-hair py-2">
        <AppLink href={`${casePath}/${move.place === 'findings' ? 'findings' : 'triage'}`} className="inline-flex min-h-(--target-height) items-center font-medium">{move.label}<span className="sr-only">{linkWords[move.place]}</span></AppLink>
        {needs}
      </div>
    );
  }
  const look = move.ready ? (first ? 'filled' : 'outlined') : 'waiting';
  return (
    <details open={refused !== undefined || (first && move.id !== 'return')} className="border-b border-hair py-1.5" id={intent}>
      <summary className="inline-flex min-h-11 items-center font-medium underline decoration-ember decoration-2 underline-offset-4 desk:min-h-9">{move.label}</summary>
      {needs}
      <Form method="post" className="space-y-3 pt-1 pb-3" preventScrollReset>
        <Refusal refused={refused} />
        <input type="hidden" name="intent" value={intent} />
        <input type="hidden" name="moveId" value={move.id} />
        <input type="hidden" name="version" value={version} />
        <MoveFields moveId={move.id} field={field} asksReason={move.asksReason} {...(proposedDay ? { proposedDay } : {})} {...(mainCases ? { mainCases } : {})} />
        <Button look={look} block>{move.label}</Button>
        {move.ready ? null : <p className="text-axis text-second">Open lines above are still needed; sending names them again.</p>}
      </Form>
    </details>
  );
}
