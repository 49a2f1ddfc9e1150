import { FactList } from '#app/components/ui/fact-list.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import type { ReleaseDocument } from '#app/domain/release-document.ts';
import { DocumentSection, PartHeading } from './document-section.tsx';
import { RedactedWords } from './redacted-words.tsx';

interface PartProps {
  readonly view: ReleaseDocument;
  readonly number: number;
}

export function SummarySection({ view, number }: PartProps) {
  return (
    <DocumentSection id="summary" title={`${number}. Summary`}>
      <p className="max-w-[64ch] font-serif text-account">{view.account.length > 0 ? <RedactedWords text={view.account} /> : 'The report came without an account.'}</p>
      {view.notes.map((note, index) => (
        <div key={index} className="max-w-[64ch] pt-3">
          <p className="text-small text-second">Note added: {note.meta}</p>
          <p className="font-serif text-account"><RedactedWords text={note.text} /></p>
        </div>
      ))}
      <div className="max-w-[64ch] pt-4">
        <FactList
          layout="columns"
          facts={[
            ...(view.placeDetail.length > 0 ? [{ term: 'Place in the building', value: <RedactedWords text={view.placeDetail} /> }] : []),
            ...view.facts,
            ...(view.interimControl.length > 0 ? [{ term: 'Interim control', value: <RedactedWords text={view.interimControl} /> }] : []),
          ]}
        />
      </div>
    </DocumentSection>
  );
}

export function ChronologySection({ view, number }: PartProps) {
  return (
    <DocumentSection id="chronology" title={`${number}. Chronology`}>
      <p className="pb-2 text-small text-second">{view.zoneWords}</p>
      <DataTable caption="Chronology of the case">
        <TableHead><HeadCell>Day</HeadCell><HeadCell>Time</HeadCell><HeadCell>What</HeadCell></TableHead>
        <tbody>
          {view.chronology.map((line, index) => (
            <Row key={index} tight>
              <Cell className="whitespace-nowrap"><time dateTime={line.atUtc}>{line.day}</time></Cell>
              <Cell className="whitespace-nowrap">{line.clock}</Cell>
              <Cell>{line.what}</Cell>
            </Row>
          ))}
        </tbody>
      </DataTable>
    </DocumentSection>
  );
}

export function MeasurementsSection({ view, number }: PartProps) {
  return (
    <DocumentSection id="measurements" title={`${number}. Measurements`}>
      {view.measurements.length === 0 ? <p className="text-second">Nothing was measured.</p> : null}
      {view.measurements.map(({ group, rows }) => (
        <div key={group}>
          <PartHeading>{group}</PartHeading>
          <DataTable caption={`Measurements: ${group}`}>
            <TableHead><HeadCell>What</HeadCell><HeadCell>Value</HeadCell><HeadCell>±</HeadCell><HeadCell>Method</HeadCell></TableHead>
            <tbody>
              {rows.map((row) => (
                <Row key={row.label} tight>
                  <Cell className="w-2/5">{row.label}</Cell>
                  <Cell>{row.value} {row.unit}</Cell>
                  <Cell>{row.plusMinus}</Cell>
                  <Cell className="text-second">{row.method}</Cell>
                </Row>
              ))}
            </tbody>
          </DataTable>
        </div>
      ))}
    </DocumentSection>
  );
}
