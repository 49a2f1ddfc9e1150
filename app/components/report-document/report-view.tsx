import type { ReactNode } from 'react';
import { Caution } from '#app/components/ui/caution.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { ReportBlock, ReportDocument } from '#app/domain/report-document.ts';
import { FigureSvg } from './figure-svg.tsx';

/** A report for screen and browser print, from the same blocks as the printed file. */
export function ReportView({ report }: { readonly report: ReportDocument }) {
  return (
    <article className="max-w-[56rem] border-hair bg-sheet px-4 py-5 tablet:border tablet:px-8 tablet:py-7" lang={report.language}>
      <h2 className="font-serif text-title">{report.title}</h2>
      <p className="font-serif text-group text-second">{report.subtitle}</p>
      <p className="pb-4 text-small text-second">{report.running}</p>
      {report.blocks.map((block, index) => <Block key={index} block={block} />)}
      {report.foot ? <p className="mt-8 border-t border-ink pt-2 font-mono text-axis break-all text-second">{report.foot}</p> : null}
    </article>
  );
}

function Block({ block }: { readonly block: ReportBlock }): ReactNode {
  switch (block.kind) {
    case 'heading':
      return block.level === 1 ? <div className="pt-8"><SectionHeading>{block.text}</SectionHeading></div> : <h3 className="pt-4 pb-1 font-semibold">{block.text}</h3>;
    case 'text':
      return block.text.split(/\n{2,}/u).filter((part) => part.trim() !== '').map((part, index) => <p key={index} className={`max-w-[64ch] pb-2 whitespace-pre-line [overflow-wrap:anywhere] ${block.voice === 'serif' ? 'font-serif text-group leading-6' : block.voice === 'small' ? 'text-small text-second' : ''}`}>{part}</p>);
    case 'list':
      return <ul className="list-disc space-y-1 pb-3 pl-5">{block.items.map((item, index) => <li key={index}>{item}</li>)}</ul>;
    case 'facts':
      return <div className="pb-3"><FactList layout="columns" facts={block.rows.map((row) => ({ term: row.term, value: <span className="whitespace-pre-line [overflow-wrap:anywhere]">{row.value}</span>, ...(row.note ? { note: row.note } : {}) }))} /></div>;
    case 'table':
      return <BlockTable table={block} />;
    case 'caution':
      return <div className="py-2"><Caution>{block.text}</Caution></div>;
    case 'figure':
      return (
        <figure className="py-3">
          <figcaption className="pb-2"><span className="font-serif">Fig. {block.number}</span> {block.title}</figcaption>
          {/* A drawing keeps its size and scrolls rather than shrink; the frame must then take the keyboard. */}
          {/* eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex */}
          <div className="overflow-x-auto" role="region" aria-label={`Figure ${block.number}`} tabIndex={0}><div className="min-w-[47rem]"><FigureSvg figure={block} /></div></div>
        </figure>
      );
  }
}

function BlockTable({ table }: { readonly table: Extract<ReportBlock, { kind: 'table' }> }) {
  return (
    <div className="pb-4">
      <DataTable caption={table.caption} className={table.head.length > 4 ? 'min-w-[38rem]' : ''}>
        <TableHead>{table.head.map((head) => <HeadCell key={head}>{head}</HeadCell>)}</TableHead>
        <tbody>
          {table.rows.map((row, index) => (
            <Row key={index} tight>{row.map((cell, place) => <Cell key={place} className={`text-small ${/^[0-9a-f]{64}$/u.test(cell) ? 'font-mono !text-axis break-all' : ''}`}>{cell}</Cell>)}</Row>
          ))}
        </tbody>
      </DataTable>
    </div>
  );
}
