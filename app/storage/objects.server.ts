import { DeleteObjectCommand, GetObjectCommand, HeadObjectCommand, NoSuchKey, NotFound, PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { env } from '#app/env.server.ts';

/** The object store: original photos, their view copies, proofs, and the files of releases. Nothing in it is public. */
const client = new S3Client({
  endpoint: env.S3_ENDPOINT,
  region: env.S3_REGION,
  forcePathStyle: env.S3_FORCE_PATH_STYLE,
  credentials: { accessKeyId: env.S3_ACCESS_KEY_ID, secretAccessKey: env.S3_SECRET_ACCESS_KEY },
  // The newer default adds trailing checksums, which some S3-compatible servers store as part of the body.
  requestChecksumCalculation: 'WHEN_REQUIRED',
  responseChecksumValidation: 'WHEN_REQUIRED',
});

export async function putObject(key: string, body: Uint8Array, mime: string): Promise<void> {
  await client.send(new PutObjectCommand({ Bucket: env.S3_BUCKET, Key: key, Body: body, ContentType: mime, ContentLength: body.byteLength }));
}

/** The whole object, or null when there is none under the key. */
export async function getObject(key: string): Promise<Uint8Array | null> {
  try {
    const answer = await client.send(new GetObjectCommand({ Bucket: env.S3_BUCKET, Key: key }));
    return answer.Body ? await answer.Body.transformToByteArray() : null;
  } catch (error) {
    if (error instanceof NoSuchKey || error instanceof NotFound) return null;
    throw error;
  }
}

export async function objectExists(key: string): Promise<boolean> {
  try {
    await client.send(new HeadObjectCommand({ Bucket: env.S3_BUCKET, Key: key }));
    return true;
  } catch (error) {
    if (error instanceof NotFound || error instanceof NoSuchKey) return false;
    throw error;
  }
}

export async function deleteObject(key: string): Promise<void> {
  await client.send(new DeleteObjectCommand({ Bucket: env.S3_BUCKET, Key: key }));
}
