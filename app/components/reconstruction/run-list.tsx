import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import type { RunLineView } from '#app/domain/run-page.ts';
import { totalsWords } from '#app/domain/run-words.ts';
import { ProgressLine } from './live-progress.tsx';

export interface RunListProps {
  readonly runs: readonly RunLineView[];
  /** Path of one run, from its number. */
  readonly pathOf: (number: number) => string;
}

/** Every run of the case, newest first: who asked when, what it went by and what it found. None is ever removed. */
export function RunList({ runs, pathOf }: RunListProps) {
  return (
    <>
      <div className="max-tablet:hidden">
        <DataTable caption="Runs of the engine, newest first">
          <TableHead>
            <HeadCell>Run</HeadCell>
            <HeadCell>Asked</HeadCell>
            <HeadCell>Window</HeadCell>
            <HeadCell>Found</HeadCell>
            <HeadCell>Grade</HeadCell>
            <HeadCell>Standing</HeadCell>
          </TableHead>
          <tbody>
            {runs.map((run) => (
              <Row key={run.number} chosen={run.standing === 'attached'}>
                <Cell heading note={<span className="font-mono">{run.inputHash.slice(0, 8)}</span>}><AppLink href={pathOf(run.number)} className="inline-flex min-h-6 items-center">Run {run.number}</AppLink></Cell>
                <Cell note={`${run.askedBy}, engine ${run.engineVersion}`}>{run.askedWords}</Cell>
                <Cell note={run.sceneVersion === null ? 'no measurements yet' : `measurements, version ${run.sceneVersion}`}>{run.windowWords}</Cell>
                <Cell><RunFound run={run} /></Cell>
                <Cell>{run.grade ? run.grade.word : ''}</Cell>
                <Cell note={run.note}>{run.standing}</Cell>
              </Row>
            ))}
          </tbody>
        </DataTable>
      </div>
      <ul className="tablet:hidden">
        {runs.map((run) => (
          <li key={run.number} className={`space-y-1 border-b border-hair py-3 ${run.standing === 'attached' ? 'border-l-4 border-l-ink bg-wash pl-3' : ''}`}>
            <p className="flex flex-wrap justify-between gap-x-4"><AppLink href={pathOf(run.number)} className="inline-flex min-h-11 items-center font-semibold">Run {run.number}</AppLink><span>{run.standing}</span></p>
            <p>{run.windowWords}</p>
            <RunFound run={run} />
            {run.grade ? <p className="font-semibold">{run.grade.word}</p> : null}
            <p className="text-small text-second">{run.askedWords}, {run.askedBy}, engine {run.engineVersion}</p>
            {run.note ? <p className="text-small text-second">{run.note}</p> : null}
          </li>
        ))}
      </ul>
    </>
  );
}

function RunFound({ run }: { readonly run: RunLineView }) {
  if (run.state === 'queued' || run.state === 'running') return <ProgressLine state={run.state} done={run.progress.done} total={run.progress.total} />;
  if (run.state === 'failed') return <p><b className="font-semibold">Failed.</b> {run.failure}</p>;
  return <span>{run.totals ? totalsWords(run.totals) : ''}</span>;
}
