import { SectionHeading } from '#app/components/ui/page-title.tsx';

export interface LeaversProps {
  readonly leavers: readonly { readonly displayName: string; readonly openCases: number; readonly openActions: number }[];
}

const counted = (count: number, one: string, many: string) => (count === 0 ? null : `${count} ${count === 1 ? one : many}`);

/** People whose account is off and who still hold open work: counts only, since an administrator reads no case content. */
export function Leavers({ leavers }: LeaversProps) {
  return (
    <>
      <SectionHeading>Leavers</SectionHeading>
      {leavers.length === 0 ? <p>Nobody whose account is switched off holds an open case or action.</p> : null}
      <ul>
        {leavers.map((leaver) => (
          <li key={leaver.displayName} className="flex flex-wrap justify-between gap-x-4 border-b border-hair py-2">
            <span className="font-semibold">{leaver.displayName}</span>
            <span>{[counted(leaver.openCases, 'case', 'cases'), counted(leaver.openActions, 'action', 'actions')].filter(Boolean).join(', ')}</span>
          </li>
        ))}
      </ul>
      {leavers.length > 0 ? <p className="pt-2 text-small text-second">A site manager hands them on. What they wrote stays under their name.</p> : null}
      <div className="pt-8">
        <SectionHeading>One person, many roles</SectionHeading>
        <p>Nobody reviews a finding or verifies an action of their own, whatever roles they hold.</p>
      </div>
    </>
  );
}
