import type { DbOrTx } from '#db/client.server.ts';
import { readCaseBeforeRedaction } from '#db/queries/case-before-redaction.server.ts';
import type { ReleaseFile, ReleaseRow } from '#db/queries/releases.server.ts';
import type { CaseBeforeRedaction } from '#app/domain/case-before-redaction.ts';
import { notFound } from '#app/domain/errors.ts';
import { foreignJpegSegments } from '#app/domain/jpeg-segments.ts';
import { redactCase } from '#app/domain/redaction.ts';
import { checkReleasedText } from '#app/domain/release-check.ts';
import type { ReleaseCheck } from '#app/domain/release-check.ts';
import type { Actor } from '#app/domain/roles.ts';
import { pdfText } from '#app/storage/pdf-text.server.ts';
import { getObject } from '#app/storage/objects.server.ts';
import { hashOf, sha256Hex } from '#app/storage/sha256.server.ts';
import { dataFileName } from './release-files.server.ts';
import { masksAreSolid } from './release-photo.server.ts';

export interface ReleaseInspection {
  readonly checks: readonly ReleaseCheck[];
  readonly passed: boolean;
  /** False when the same decisions would give something else today. */
  readonly caseUnchanged: boolean;
  /** Stands for the case as it was while the bytes were searched. */
  readonly sourceHash: string;
}

interface ReadFile extends ReleaseFile {
  readonly found: Uint8Array | null;
}

/** Reads every file of a release back from the store and searches its bytes for what must not be in them. */
export async function inspectRelease(db: DbOrTx, params: { readonly actor: Actor; readonly caseNumber: number; readonly release: ReleaseRow }): Promise<ReleaseInspection> {
  const { actor, caseNumber, release } = params;
  const current = await readCaseBeforeRedaction(db, { actor, caseNumber });
  if (!current) throw notFound('The case');
  const files: ReadFile[] = [];
  for (const file of release.files) files.push({ ...file, found: await getObject(file.objectKey) });
  const checks = [hashCheck(release, files), ...(await textChecks(release, files, current.source)), ...(await photoChecks(files, current.source))];
  const today = redactCase(current.source, release.audience, release.decisions);
  return { checks, passed: checks.every((check) => check.passed), caseUnchanged: hashOf(today.released) === release.releasedHash, sourceHash: hashOf(current.source) };
}

function hashCheck(release: ReleaseRow, files: readonly ReadFile[]): ReleaseCheck {
  const wrong = files.filter((file) => file.found === null || sha256Hex(file.found) !== file.sha256).map((file) => file.name);
  const caseWrong = hashOf(release.released) === release.releasedHash ? [] : ['the released case'];
  const all = [...caseWrong, ...wrong];
  return { id: 'hashes', label: 'Every file is the one of the manifest', passed: all.length === 0, note: all.length === 0 ? `${files.length} files` : `not the same: ${all.join(', ')}` };
}

const decoder = new TextDecoder();

async function textChecks(release: ReleaseRow, files: readonly ReadFile[], source: CaseBeforeRedaction): Promise<readonly ReleaseCheck[]> {
  const texts = await Promise.all(files.filter((file) => !file.mime.startsWith('image/')).map(async (file) => ({ fileName: file.name, text: await textOf(file) })));
  const data = texts.find((file) => file.fileName === dataFileName)?.text ?? '';
  // The manifest is shown to the reader beside the files.
  const manifest = { fileName: 'manifest', text: files.map((file) => `${file.name} ${file.change}`).join('\n') };
  return checkReleasedText({ source, audience: release.audience, data: parsed(data), texts: [...texts, manifest], changeNote: release.changeNote, fileNames: files.map((file) => file.name) });
}

/** What can be read out of a file. A printed file that cannot be read fails by its hash. */
async function textOf({ mime, found }: ReadFile): Promise<string> {
  if (!found) return '';
  return mime === 'application/pdf' ? await pdfText(found) : decoder.decode(found);
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    // A data file that is none fails by its hash; the searches then have nothing to run over.
    return null;
  }
}

async function photoChecks(files: readonly ReadFile[], source: CaseBeforeRedaction): Promise<readonly ReleaseCheck[]> {
  const photos = files.filter((file) => file.mime.startsWith('image/'));
  const carrying: string[] = [];
  const open: string[] = [];
  let boxes = 0;
  for (const file of photos) {
    const bytes = file.found ?? new Uint8Array();
    const foreign = foreignJpegSegments(bytes);
    if (foreign.length > 0) carrying.push(`${file.name} (${foreign.join(', ')})`);
    const photo = source.photos.find((one) => `photo-${String(one.label).padStart(2, '0')}.jpg` === file.name);
    boxes += photo?.masks.length ?? 0;
    if (!photo || photo.releasable !== 'yes' || foreign.includes('not a JPEG') || !(await masksAreSolid(bytes, photo.masks))) open.push(file.name);
  }
  return [
    { id: 'photo-data', label: 'Photos hold nothing but the picture', passed: carrying.length === 0, note: carrying.length === 0 ? `${photos.length} photos: no camera, time or place` : carrying.join('; ') },
    { id: 'photo-boxes', label: 'Every box of a photo is solid, and each photo may leave', passed: open.length === 0, note: open.length === 0 ? `${boxes} boxes in ${photos.length} photos` : `look again at ${open.join(', ')}` },
  ];
}
