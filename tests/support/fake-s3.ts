import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import S3rver from 's3rver';

/** Settings under which the application reaches a stand-in. */
export interface FakeS3 {
  readonly endpoint: string;
  readonly env: Readonly<Record<string, string>>;
  readonly stop: () => Promise<void>;
}

/**
 * An object store of one's own, with empty contents, for tests that must see it stop or fail. Other tests use the one
 * in the settings. It cannot prove access control: it accepts wrong signatures and anonymous reads.
 */
export async function startFakeS3(bucket = 'scorchline'): Promise<FakeS3> {
  const directory = await mkdtemp(join(tmpdir(), 'scorchline-s3-'));
  const server = new S3rver({
    address: '127.0.0.1',
    port: 0,
    directory,
    silent: true,
    configureBuckets: [{ name: bucket, configs: [] }],
  });
  const { port } = await server.run();
  const endpoint = `http://127.0.0.1:${port}`;
  return {
    endpoint,
    env: {
      S3_ENDPOINT: endpoint,
      S3_REGION: 'eu-central-1',
      S3_BUCKET: bucket,
      S3_ACCESS_KEY_ID: 'S3RVER',
      S3_SECRET_ACCESS_KEY: 'S3RVER',
      S3_FORCE_PATH_STYLE: 'true',
    },
    stop: async () => {
      await server.close();
      await rm(directory, { recursive: true, force: true });
    },
  };
}
