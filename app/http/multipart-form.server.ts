import { FormDataParseError, MaxFilesExceededError, parseFormData } from '@remix-run/form-data-parser';
import { env } from '#app/env.server.ts';
import { DomainError } from '#app/domain/errors.ts';

/** A part with a file in it. */
export interface UploadedFile {
  readonly fieldName: string;
  readonly name: string;
  readonly bytes: Uint8Array;
}

const filesPerRequest = 20;
const partsPerRequest = 300;
const fieldsBytes = 2_000_000;
const photosAtOnce = 8;

/**
 * Reads a form that may carry files. Each file is handed over as it arrives and is not kept here; an empty file field
 * hands over nothing. A file over the photo limit is still handed over, so that it gets a sentence of its own while the
 * rest of the form survives; the server's own limit on the whole body stays above all.
 *
 * @returns the text fields.
 * @throws DomainError `invalid-input` when the body is no form, or holds too many parts.
 */
export async function readForm(request: Request, onFile: (file: UploadedFile) => Promise<void>): Promise<FormData> {
  const totalBytes = photosAtOnce * env.PHOTO_MAX_BYTES + fieldsBytes;
  const limits = { maxFiles: filesPerRequest, maxParts: partsPerRequest, maxFileSize: totalBytes, maxTotalSize: totalBytes };
  try {
    return await parseFormData(request, limits, async (upload) => {
      // A file field left empty: browsers send it with an empty name, other clients with none, for which the parser has a word.
      if (upload.size === 0 && ['', 'file-upload'].includes(upload.name)) return null;
      await onFile({ fieldName: upload.fieldName, name: upload.name, bytes: await upload.bytes() });
      return null;
    });
  } catch (error) {
    if (error instanceof MaxFilesExceededError) throw new DomainError('invalid-input', `Send at most ${filesPerRequest} photos at once, and the rest afterwards.`);
    if (error instanceof FormDataParseError || (error instanceof Error && error.name.startsWith('Max'))) {
      throw new DomainError('invalid-input', 'What was sent could not be read as a form. Go back and send it again.');
    }
    throw error;
  }
}
