import { attachmentClassLabels, attachmentCode, attachmentKindLabels } from './attachment.ts';
import type { AttachmentClass, AttachmentKind } from './attachment.ts';
import { formatDayClock } from './local-time.ts';

/** What a row of the documents holds that pages show. */
export interface DocumentFacts {
  readonly id: string;
  readonly label: number;
  readonly title: string;
  readonly kind: AttachmentKind;
  readonly class: AttachmentClass;
  readonly mime: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly hashCheck: 'same' | 'differs' | 'missing' | null;
  readonly hashCheckedAt: Date | null;
  readonly createdAt: Date;
  readonly uploadedBy: string;
}

export interface DocumentView {
  readonly id: string;
  readonly code: string;
  readonly title: string;
  readonly kind: string;
  readonly class: string;
  readonly size: string;
  readonly sha256: string;
  readonly hashCheck: DocumentFacts['hashCheck'];
  readonly hashWords: string;
  readonly added: string;
}

const formats: Readonly<Record<string, string>> = { 'application/pdf': 'PDF', 'text/csv': 'CSV', 'text/plain': 'text', 'image/jpeg': 'JPEG', 'image/png': 'PNG', 'image/webp': 'WebP' };

export function documentView(document: DocumentFacts, zone: string): DocumentView {
  const when = document.hashCheckedAt ? `, ${formatDayClock(document.hashCheckedAt, zone)}` : '';
  const checked = { same: `same as at intake${when}`, differs: `differs, not handed out${when}`, missing: `missing from the store${when}` };
  return {
    id: document.id,
    code: attachmentCode(document.label),
    title: document.title,
    kind: attachmentKindLabels[document.kind],
    class: attachmentClassLabels[document.class],
    size: `${formats[document.mime] ?? document.mime}, ${document.bytes < 1_000_000 ? `${Math.max(1, Math.ceil(document.bytes / 1000))} kB` : `${(document.bytes / 1_000_000).toFixed(1)} MB`}`,
    sha256: document.sha256,
    hashCheck: document.hashCheck,
    hashWords: document.hashCheck ? checked[document.hashCheck] : 'hashed again at each download',
    added: `${document.uploadedBy}, ${formatDayClock(document.createdAt, zone)}`,
  };
}
