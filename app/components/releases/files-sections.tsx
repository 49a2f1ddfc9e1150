import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import type { ReleaseDocument } from '#app/domain/release-document.ts';
import type { ReleaseFrame } from '#app/domain/release-view.ts';
import { shortHash } from '#app/domain/release-view.ts';
import { DocumentSection } from './document-section.tsx';
import { RedactedWords } from './redacted-words.tsx';

/** Columns that a phone leaves out; there the first one says the same. */
const wide = 'max-tablet:hidden';

export type FileHref = (fileName: string) => string;

export function PhotosSection({ photos, fileHref, number }: { readonly photos: ReleaseDocument['photos']; readonly fileHref: FileHref; readonly number: number }) {
  return (
    <DocumentSection id="photos" title={`${number}. Photos`}>
      {photos.length === 0 ? <p className="text-second">No photo is part of this release.</p> : null}
      <ul className="grid gap-6 tablet:grid-cols-2">
        {photos.map((photo) => (
          <li key={photo.fileName} className="avoid-break min-w-0">
            <figure>
              <img src={fileHref(photo.fileName)} alt={photo.alternative} loading="lazy" className="block w-full bg-wash" />
              <figcaption className="pt-1.5 text-small">
                <span className="font-semibold">{photo.fileName}</span>, {photo.viewWords}{photo.maskWords ? `, ${photo.maskWords}` : ''}
                {photo.caption.length > 0 ? <span className="block font-serif text-group"><RedactedWords text={photo.caption} /></span> : null}
              </figcaption>
            </figure>
          </li>
        ))}
      </ul>
    </DocumentSection>
  );
}

export function ManifestSection({ frame, fileHref, number }: { readonly frame: ReleaseFrame; readonly fileHref: FileHref; readonly number: number }) {
  return (
    <DocumentSection id="manifest" title={`${number}. Manifest`}>
      <DataTable caption="Files of this release">
        <TableHead><HeadCell>File</HeadCell><HeadCell className={wide}>Change made</HeadCell><HeadCell numeric className={wide}>Bytes</HeadCell><HeadCell className={wide}>SHA-256, first 8 bytes</HeadCell></TableHead>
        <tbody>
          {frame.manifest.map((file) => (
            <Row key={file.name} tight>
              <Cell>
                <a href={fileHref(file.name)} download className="inline-flex min-h-(--target-height) items-center desk:min-h-6">{file.name}</a>
                <span className="block pb-1 text-small text-second tablet:hidden">{file.change}; {file.bytes} bytes; <span className="font-mono text-axis">{shortHash(file.sha256)}</span></span>
              </Cell>
              <Cell className={wide}>{file.change}</Cell>
              <Cell numeric className={wide}>{file.bytes}</Cell>
              <Cell className={`${wide} font-mono text-axis whitespace-nowrap`}><span title={file.sha256}>{shortHash(file.sha256)}</span></Cell>
            </Row>
          ))}
        </tbody>
      </DataTable>
      <p className="pt-2 text-small text-second">
        This page is made from data.json, whose SHA-256 is <span className="font-mono text-axis break-all">{frame.releasedHash}</span>. Hashes are checked each time a file is opened.
      </p>
    </DocumentSection>
  );
}
