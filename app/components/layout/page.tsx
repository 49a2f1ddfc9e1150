import type { ReactNode } from 'react';

export interface PageProps {
  readonly children: ReactNode;
  /** Room for a fixed bar at the foot. */
  readonly withBar?: boolean;
  /** `reading` keeps to 64 characters, `task` to a phone's column. */
  readonly width?: 'full' | 'reading' | 'task';
}

const widths = { full: 'max-w-[1600px]', reading: 'max-w-[calc(64ch+2*var(--page-margin))]', task: 'max-w-[560px]' } as const;

/** The main part of a page, with the margins of the breakpoint. */
export function Page({ children, withBar = false, width = 'full' }: PageProps) {
  return (
    <main id="main" tabIndex={-1} className={`mx-auto px-(--page-margin) outline-none ${widths[width]} ${withBar ? 'pb-32' : 'pb-12'}`}>
      {children}
    </main>
  );
}

export interface ColumnsProps {
  readonly children: ReactNode;
  readonly side: ReactNode;
  /** The side stands left of main, as inputs do; below 1100 px it always follows main. */
  readonly sideFirst?: boolean;
  readonly sideLabel: string;
}

/** Main and side column at the desk, one column below 1100 px. */
export function Columns({ children, side, sideFirst = false, sideLabel }: ColumnsProps) {
  return (
    <div className={`gap-x-8 desk:grid ${sideFirst ? 'desk:grid-cols-[270px_minmax(0,1fr)]' : 'desk:grid-cols-[minmax(0,1fr)_300px] desk:gap-x-12'}`}>
      <div className={`min-w-0 ${sideFirst ? 'desk:order-2' : ''}`}>{children}</div>
      <aside aria-label={sideLabel} className={`min-w-0 max-desk:mt-8 ${sideFirst ? 'desk:order-1' : 'desk:border-l desk:border-hair desk:pl-6'}`}>{side}</aside>
    </div>
  );
}

export interface FixedBarProps {
  /** What is where: "Saved on this phone, 15:12". */
  readonly title: ReactNode;
  readonly detail?: ReactNode;
  /** One or two buttons. */
  readonly action?: ReactNode;
  /** Show the phone sign. */
  readonly onPhone?: boolean;
}

/** Bar at the foot that always says where the words are. */
export function FixedBar({ title, detail, action, onPhone = false }: FixedBarProps) {
  return (
    <div className="fixed-bar fixed inset-x-0 bottom-0 z-10 border-t-2 border-ink bg-sheet pb-[env(safe-area-inset-bottom)]">
      <div className="mx-auto flex max-w-[1600px] items-center gap-3.5 px-(--page-margin) py-3">
        {onPhone ? <PhoneSign /> : null}
        <div className="min-w-0 flex-1" role="status">
          <p className="font-semibold">{title}</p>
          {detail ? <p className="text-small text-second">{detail}</p> : null}
        </div>
        <div className="flex flex-none gap-2.5">{action}</div>
      </div>
    </div>
  );
}

function PhoneSign() {
  return (
    <svg width="14" height="20" viewBox="0 0 14 20" aria-hidden="true" className="flex-none fill-none stroke-ink">
      <rect x="1.2" y="1.2" width="11.6" height="17.6" strokeWidth="1.9" />
      <path d="m4.2 10.2 2 2 3.6-4.2" strokeWidth="1.6" />
    </svg>
  );
}

export interface TwoPartBarProps {
  readonly label: string;
  readonly detail: string;
  /** Part that has reached the team, 0 to 1. */
  readonly sentPart: number;
}

/** Upload of one thing: on this phone, then with the team. Plain, no ruler and no slot. */
export function TwoPartBar({ label, detail, sentPart }: TwoPartBarProps) {
  const filled = 50 + Math.max(0, Math.min(1, sentPart)) * 50;
  return (
    <div>
      <p className="flex justify-between gap-3 pb-1.5"><span className="font-semibold">{label}</span><span>{detail}</span></p>
      <svg width="100%" height="14" role="img" aria-label={`${label}: ${detail}`}>
        <rect x="0.5" y="2.5" width="99.8%" height="9" className="fill-pale stroke-pale-edge" />
        <rect x="0" y="2" width={`${filled}%`} height="10" className="fill-card" />
        <line x1="50%" x2="50%" y1="0" y2="14" className="stroke-ink" strokeWidth="1.5" />
      </svg>
    </div>
  );
}
