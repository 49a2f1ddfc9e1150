import { DomainError } from '#app/domain/errors.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';

export const proofMaxBytes = 25 * 1024 * 1024;
export const proofMaxFiles = 5;

export interface StoredProof {
  readonly fileName: string;
  readonly mime: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly objectKey: string;
}

interface Kind {
  readonly mime: string;
  readonly extension: string;
  readonly matches: (head: Uint8Array) => boolean;
}

const startsWith = (head: Uint8Array, signature: readonly number[], at = 0) => signature.every((byte, index) => head[at + index] === byte);
const ascii = (text: string) => [...text].map((character) => character.charCodeAt(0));

/** By the first bytes, whatever the name says: JPEG (ITU-T T.81), PNG (ISO/IEC 15948), WebP (RFC 9649), PDF (ISO 32000). */
const kinds: readonly Kind[] = [
  { mime: 'image/jpeg', extension: 'jpg', matches: (head) => startsWith(head, [0xff, 0xd8, 0xff]) },
  { mime: 'image/png', extension: 'png', matches: (head) => startsWith(head, [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]) },
  { mime: 'image/webp', extension: 'webp', matches: (head) => startsWith(head, ascii('RIFF')) && startsWith(head, ascii('WEBP'), 8) },
  { mime: 'application/pdf', extension: 'pdf', matches: (head) => startsWith(head, ascii('%PDF-')) },
];

export function proofKind(bytes: Uint8Array): Pick<Kind, 'mime' | 'extension'> | null {
  return kinds.find((kind) => kind.matches(bytes)) ?? null;
}

/** A name that is safe in a header and in a folder, with the extension of what the file really is. */
export function proofName(given: string, extension: string): string {
  const last = given.normalize('NFC').split(/[/\\]/u).at(-1) ?? '';
  const stem = last
    .replace(/\.[^.]*$/u, '')
    .replace(/[^\p{L}\p{N} _-]+/gu, '-')
    .replace(/^[-_ ]+|[-_ ]+$/gu, '')
    .slice(0, 80);
  return `${stem === '' ? 'proof' : stem}.${extension}`;
}

/**
 * Reads, checks and stores the files of one form; nothing is written to the database here. The key holds the hash, so a
 * retry writes the same bytes to the same place.
 *
 * @throws DomainError `invalid-input` naming each file that cannot be taken, and why.
 */
export async function storeProofs(actionId: string, files: readonly File[]): Promise<StoredProof[]> {
  const given = files.filter((file) => file.name !== '' || file.size > 0);
  const problems = given.length > proofMaxFiles ? [`At most ${proofMaxFiles} files at once; add the others afterwards.`] : [];
  const ready: (StoredProof & { readonly content: Uint8Array })[] = [];
  for (const file of given.slice(0, proofMaxFiles)) {
    const content = new Uint8Array(await file.arrayBuffer());
    const kind = proofKind(content);
    if (content.byteLength === 0) problems.push(`"${file.name}" is empty: choose it again.`);
    else if (content.byteLength > proofMaxBytes) problems.push(`"${file.name}" is larger than 25 MB: send a smaller copy.`);
    else if (!kind) problems.push(`"${file.name}" is not a JPEG, PNG, WebP or PDF inside, whatever its name says.`);
    else {
      const sha256 = sha256Hex(content);
      ready.push({ fileName: proofName(file.name, kind.extension), mime: kind.mime, bytes: content.byteLength, sha256, objectKey: `proofs/${actionId}/${sha256}`, content });
    }
  }
  if (problems.length > 0) throw new DomainError('invalid-input', 'Some files cannot be taken.', { fieldErrors: { files: problems } });
  for (const { content, ...proof } of ready) await putObject(proof.objectKey, content, proof.mime);
  return ready.map(({ content: _content, ...proof }) => proof);
}
