/** Settings of the object store that the tests share: the one `npm test` started, or that of a running `npm start`. */
export function objectStoreEnv(): Record<string, string> {
  return {
    S3_ENDPOINT: process.env.S3_ENDPOINT ?? 'http://127.0.0.1:55433',
    S3_REGION: process.env.S3_REGION ?? 'eu-central-1',
    S3_BUCKET: process.env.S3_BUCKET ?? 'scorchline',
    S3_ACCESS_KEY_ID: process.env.S3_ACCESS_KEY_ID ?? 'S3RVER',
    S3_SECRET_ACCESS_KEY: process.env.S3_SECRET_ACCESS_KEY ?? 'S3RVER',
    S3_FORCE_PATH_STYLE: 'true',
  };
}
