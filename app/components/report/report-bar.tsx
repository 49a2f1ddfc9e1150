import { FixedBar } from '#app/components/layout/page.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { deviceWord } from './device-word.ts';
import type { ReportDraft } from './use-report-draft.ts';

export interface ReportBarProps {
  readonly hydrated: boolean;
  readonly draft: ReportDraft;
}

/** Always says where the words are and what is still missing. */
export function ReportBar({ hydrated, draft }: ReportBarProps) {
  const waits = hydrated && draft.missing !== null;
  const send = <Button look={waits ? 'waiting' : 'filled'} name="intent" value="send">Send</Button>;
  // Without a script the make-safe card is on the same page, and nothing may lie over it.
  if (!hydrated) return <div className="flex items-center justify-between gap-4 border-t-2 border-ink py-4"><p>Four answers are needed; “Don't know” is one.</p>{send}</div>;
  const saved = draft.unkept ? 'Not kept: leave this page open' : draft.savedAt === null ? 'Nothing typed yet' : `Saved on this ${deviceWord()}, ${draft.savedAt}`;
  return (
    <FixedBar
      title={saved}
      detail={draft.missing === null ? 'All four answered' : `${draft.answered} of 4 answered; say ${draft.missing}`}
      onPhone={draft.savedAt !== null}
      action={send}
    />
  );
}
