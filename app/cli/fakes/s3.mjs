/**
 * A local stand-in for an S3 service. It proves nothing about access control: it accepts wrong signatures and
 * anonymous reads. Settings come as arguments: port, folder, bucket.
 */
import S3rver from 's3rver';

const [port, directory, bucket] = process.argv.slice(2);
if (!port || !directory || !bucket) throw new Error('Usage: s3.mjs <port> <folder> <bucket>');

const server = new S3rver({
  address: '127.0.0.1',
  port: Number(port),
  directory,
  silent: true,
  configureBuckets: [{ name: bucket, configs: [] }],
});
await server.run();
console.log(`Object store stand-in on port ${port}, files in ${directory}`);

for (const signal of ['SIGTERM', 'SIGINT']) process.once(signal, () => process.exit(0));
