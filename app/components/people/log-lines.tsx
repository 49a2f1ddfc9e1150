import { href } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';

export interface LogLineView {
  readonly sequence: number;
  /** UTC, to the second. */
  readonly at: string;
  readonly actorName: string;
  readonly caseNumber: number | null;
  readonly event: string;
  readonly summary: string;
  readonly reason: string;
}

interface LinesProps {
  readonly lines: readonly LogLineView[];
  /** False for a reader who is told that something was done in a case, but not what. */
  readonly withContent: boolean;
}

/** Lines of the log: a table at the desk, a list on a phone. */
export function LogLines({ lines, withContent }: LinesProps) {
  return (
    <>
      <div className="max-tablet:hidden">
        <DataTable caption="Log, newest first">
          <TableHead>
            <HeadCell>When, UTC</HeadCell>
            <HeadCell>Who</HeadCell>
            <HeadCell>Case</HeadCell>
            <HeadCell>Event</HeadCell>
            <HeadCell>What and why</HeadCell>
          </TableHead>
          <tbody>
            {lines.map((line) => (
              <Row key={line.sequence} tight>
                <Cell className="whitespace-nowrap">{line.at}</Cell>
                <Cell>{line.actorName}</Cell>
                <Cell><CaseNumber line={line} withContent={withContent} /></Cell>
                <Cell><EventWord line={line} /></Cell>
                <Cell note={line.reason || undefined}><Summary line={line} withContent={withContent} /></Cell>
              </Row>
            ))}
          </tbody>
        </DataTable>
      </div>
      <ol className="border-t-[1.5px] border-ink tablet:hidden" aria-label="Log, newest first">
        {lines.map((line) => (
          <li key={line.sequence} className="border-b border-hair py-2">
            <p className="flex flex-wrap justify-between gap-x-4 text-small text-second">
              <span>{line.at}</span>
              <EventWord line={line} />
            </p>
            <p>
              <span className="font-semibold">{line.actorName}</span>
              {line.caseNumber === null ? null : <>, case <CaseNumber line={line} withContent={withContent} /></>}
            </p>
            <p><Summary line={line} withContent={withContent} /></p>
            {line.reason ? <p className="text-small text-second">{line.reason}</p> : null}
          </li>
        ))}
      </ol>
    </>
  );
}

function EventWord({ line }: { readonly line: LogLineView }) {
  return <code className="font-mono text-axis">{line.event}</code>;
}

function CaseNumber({ line, withContent }: { readonly line: LogLineView; readonly withContent: boolean }) {
  if (line.caseNumber === null) return null;
  return withContent ? <AppLink href={href('/cases/:caseNumber', { caseNumber: String(line.caseNumber) })}>{line.caseNumber}</AppLink> : <>{line.caseNumber}</>;
}

function Summary({ line, withContent }: { readonly line: LogLineView; readonly withContent: boolean }) {
  return withContent || line.caseNumber === null ? <>{line.summary}</> : <span className="text-small text-second">case content, not shown</span>;
}
