import { FixedBar } from '#app/components/layout/page.tsx';
import { Button } from '#app/components/ui/button.tsx';
import type { ReportDraft } from './use-report-draft.ts';
import type { SendingState } from './use-report-sending.ts';

export interface ReportBarProps {
  readonly hydrated: boolean;
  readonly draft: ReportDraft;
  readonly sending: SendingState;
  readonly photosOnTheWay: number;
}

/** Always says where the words are and what is still missing. */
export function ReportBar({ hydrated, draft, sending, photosOnTheWay }: ReportBarProps) {
  const { title, detail } = words({ hydrated, draft, sending, photosOnTheWay });
  const waits = hydrated && draft.missing !== null;
  const send = <Button look={waits ? 'waiting' : 'filled'} name="intent" value="send">{buttonWord(sending)}</Button>;
  // Without a script the make-safe card is on the same page, and nothing may lie over it.
  if (!hydrated) return <div className="flex items-center justify-between gap-4 border-t-2 border-ink py-4"><p>{detail}</p>{send}</div>;
  return (
    <FixedBar
      title={title}
      detail={detail}
      onPhone={draft.savedAt !== null}
      action={send}
    />
  );
}

function buttonWord(sending: SendingState): string {
  if (sending === 'sending') return 'Sending…';
  if (sending === 'waiting-for-photos') return 'Send without them';
  return sending === 'waiting-for-signal' ? 'Try now' : 'Send';
}

/** A desk computer is not called a phone. */
const deviceWord = () => (window.matchMedia('(pointer: coarse)').matches ? 'phone' : 'device');

function words({ hydrated, draft, sending, photosOnTheWay }: ReportBarProps): { title: string; detail: string } {
  if (!hydrated) return { title: '', detail: "Four answers are needed; “Don't know” is one." };
  const saved = draft.unkept ? 'Not kept: leave this page open' : draft.savedAt === null ? 'Nothing typed yet' : `Saved on this ${deviceWord()}, ${draft.savedAt}`;
  if (sending === 'waiting-for-signal') return { title: saved, detail: 'No signal. It goes by itself, once only' };
  if (sending === 'waiting-for-photos') return { title: saved, detail: `${photosOnTheWay === 1 ? 'One photo is' : `${photosOnTheWay} photos are`} still on the way` };
  return { title: saved, detail: draft.missing === null ? 'All four answered' : `${draft.answered} of 4 answered; say ${draft.missing}` };
}
