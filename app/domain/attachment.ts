import { z } from 'zod';
import { plainText } from './incident.ts';

export const attachmentKinds = ['protocol', 'signed-statement', 'log', 'laboratory-report', 'drawing', 'correspondence', 'other'] as const;
export type AttachmentKind = (typeof attachmentKinds)[number];
export const attachmentKindLabels: Record<AttachmentKind, string> = {
  protocol: 'Protocol of an examination',
  'signed-statement': 'Signed statement',
  log: 'Alarm, camera or access log',
  'laboratory-report': 'Laboratory report',
  drawing: 'Drawing or plan',
  correspondence: 'Letter or e-mail',
  other: 'Other document',
};

/** Personal: for those who may see personal fields. Legal: for those who may see the privileged part. */
export const attachmentClasses = ['ordinary', 'personal', 'legal'] as const;
export type AttachmentClass = (typeof attachmentClasses)[number];
export const attachmentClassLabels: Record<AttachmentClass, string> = { ordinary: 'Ordinary', personal: 'Personal', legal: 'Legal advice' };

export const attachmentMaxBytes = 25 * 1024 * 1024;
export const attachmentsPerCase = 200;

export const attachmentMimes = ['application/pdf', 'text/csv', 'text/plain', 'image/jpeg', 'image/png', 'image/webp'] as const;
export type AttachmentMime = (typeof attachmentMimes)[number];
export const attachmentExtensions: Record<AttachmentMime, string> = {
  'application/pdf': 'pdf',
  'text/csv': 'csv',
  'text/plain': 'txt',
  'image/jpeg': 'jpg',
  'image/png': 'png',
  'image/webp': 'webp',
};

const startsWith = (bytes: Uint8Array, signature: readonly number[], at = 0) => signature.every((byte, index) => bytes[at + index] === byte);
const ascii = (text: string) => [...text].map((character) => character.charCodeAt(0));

/**
 * What a document is, by its bytes: JPEG (ITU-T T.81), PNG (ISO/IEC 15948), WebP (RFC 9649), PDF (ISO 32000), or text that
 * is whole UTF-8 without control characters. The name only tells a table from plain text.
 *
 * @returns null for anything else.
 */
export function attachmentContent(bytes: Uint8Array, name: string): AttachmentMime | null {
  if (startsWith(bytes, [0xff, 0xd8, 0xff])) return 'image/jpeg';
  if (startsWith(bytes, [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a])) return 'image/png';
  if (startsWith(bytes, ascii('RIFF')) && startsWith(bytes, ascii('WEBP'), 8)) return 'image/webp';
  if (startsWith(bytes, ascii('%PDF-'))) return 'application/pdf';
  if (!isPlainUtf8(bytes)) return null;
  return /\.(?:csv|tsv)$/iu.test(name) ? 'text/csv' : 'text/plain';
}

function isPlainUtf8(bytes: Uint8Array): boolean {
  try {
    const text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
    return !/[\u0000-\u0008\u000B\u000E-\u001F\u007F]/u.test(text);
  } catch {
    // Bytes that are no UTF-8 are no text; that is the answer.
    return false;
  }
}

export const attachmentFormSchema = z.object({
  title: plainText(160).pipe(z.string().min(3, 'Say in a few words what the document is; no names of people.')),
  kind: z.enum(attachmentKinds, 'Choose what kind of document it is.'),
  class: z.enum(attachmentClasses, 'Choose who may read it.'),
});
export type AttachmentForm = z.infer<typeof attachmentFormSchema>;

/** Sentences for files that cannot be taken; each names the file and says how to mend it. */
export const attachmentRefusal = {
  none: 'Choose a file first.',
  empty: (name: string) => `“${name}” is empty: it holds no bytes. Choose it again.`,
  tooBig: (name: string) => `“${name}” is larger than 25 MB. Send it in parts, or a smaller copy.`,
  otherKind: (name: string) => `“${name}” is not a PDF, a JPEG, PNG or WebP picture, or plain text inside, whatever its name says. Save it as one of these and choose it again.`,
  tooMany: `A case holds at most ${attachmentsPerCase} documents.`,
} as const;

/** `D3`, the mark by which texts and tables name a document. */
export const attachmentCode = (label: number): string => `D${label}`;
