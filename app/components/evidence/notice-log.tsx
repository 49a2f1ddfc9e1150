import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { NoticeView } from '#app/domain/evidence-steps-view.ts';

export interface NoticeLogProps {
  readonly notices: readonly NoticeView[];
  /** Of a whole case: names the item, and leaves persons to the page of the item. */
  readonly ofCase?: boolean;
}

/** Who was told of what, when and how, and what they answered. */
export function NoticeLog({ notices, ofCase = false }: NoticeLogProps) {
  return (
    <section aria-labelledby="notice-log">
      <SectionHeading id="notice-log">Notice log</SectionHeading>
      {notices.length === 0 ? <p className="text-second">No notice is recorded.</p> : (
        <DataTable caption="Notice log" className={ofCase ? '' : 'min-w-[40rem]'}>
          <TableHead>
            <HeadCell>Told</HeadCell>
            <HeadCell>Sent</HeadCell>
            {ofCase ? null : <HeadCell>About</HeadCell>}
            <HeadCell>Answer</HeadCell>
          </TableHead>
          <tbody>
            {notices.map((notice) => (
              <Row key={notice.id}>
                <Cell heading note={ofCase ? `${notice.code}, ${notice.about}` : notice.toWhom}>{notice.role}</Cell>
                <Cell note={notice.way}>{ofCase ? notice.sentDay : notice.sent}</Cell>
                {ofCase ? null : <Cell>{notice.about}</Cell>}
                <Cell note={answerNote(notice)}>{notice.answer ? <span className={notice.answer.objects ? 'font-semibold' : ''}>{notice.answer.words}</span> : <b>none yet</b>}</Cell>
              </Row>
            ))}
          </tbody>
        </DataTable>
      )}
      {ofCase && notices.length > 0 ? <p className="pt-2 text-axis text-second">Parts only here. Who a notice went to stands on the page of the item.</p> : null}
    </section>
  );
}

function answerNote({ answer, earlier }: NoticeView): string {
  return [answer?.came, answer?.note, earlier.length > 0 ? `before: ${earlier.join(', ')}` : ''].filter(Boolean).join('; ');
}
