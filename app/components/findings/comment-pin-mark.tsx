import type { CommentPin } from '#app/domain/finding-view.ts';

export interface CommentPinMarkProps {
  readonly pin: Pick<CommentPin, 'id' | 'pin' | 'settled'>;
  /** Leads from the field to the comment. */
  readonly linked?: boolean;
}

/** Filled while open, thin with a tick once settled; the number is the same on the field and at the comment. */
export function CommentPinMark({ pin, linked = false }: CommentPinMarkProps) {
  const settled = pin.settled !== null;
  const mark = (
    <span className={`relative inline-flex h-6 min-w-6 items-center justify-center border-[1.5px] border-ink px-1 font-sans text-axis font-semibold ${settled ? 'border-hair bg-transparent text-second' : 'bg-ink text-paper'}`}>
      {pin.pin}
      {settled ? <svg width="12" height="12" viewBox="0 0 12 12" aria-hidden="true" className="ml-0.5"><path d="m2 6.4 2.6 2.6L10 3" fill="none" stroke="currentColor" strokeWidth="1.8" /></svg> : null}
      <span className="sr-only">{settled ? ' settled' : ' open'}</span>
    </span>
  );
  return linked ? <a href={`#comment-${pin.id}`} className="no-underline"><span className="sr-only">Comment </span>{mark}</a> : mark;
}
