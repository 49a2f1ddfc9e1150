import type { ReactNode } from 'react';

export interface NoticeProps {
  readonly title?: string;
  readonly children?: ReactNode;
  /** `status` is read out when it appears; `alert` interrupts, for errors after a failed save. */
  readonly role?: 'status' | 'alert' | 'note';
}

/** What happened, what is kept, what to do; on sheet between two rules. */
export function Notice({ title, children, role = 'status' }: NoticeProps) {
  return (
    <div role={role} className="border-y-[1.5px] border-ink bg-sheet px-4 py-3">
      {title ? <p className="font-serif text-account leading-6">{title}</p> : null}
      {children ? <div className="text-body text-second">{children}</div> : null}
    </div>
  );
}

export interface EmptyStateProps {
  readonly title: string;
  readonly children?: ReactNode;
  /** The one way on. */
  readonly action?: ReactNode;
  /** An unexamined card, or a sample. */
  readonly drawing?: ReactNode;
}

/** One serif sentence and one way on. */
export function EmptyState({ title, children, action, drawing }: EmptyStateProps) {
  return (
    <div className="max-w-[64ch] space-y-2 py-4">
      <p className="font-serif text-account">{title}</p>
      {children ? <p className="text-second">{children}</p> : null}
      {drawing}
      {action}
    </div>
  );
}
