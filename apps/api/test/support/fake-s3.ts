import { DeleteBucketCommand, ListObjectsV2Command, S3Client } from '@aws-sdk/client-s3';
import { startFauxqs } from 'fauxqs';

/** Starts a store in memory that speaks the protocol of S3, on loopback, with an empty bucket. */
export async function startFakeS3() {
  const server = await startFauxqs({ port: 0, host: '127.0.0.1', logger: false });
  const settings = {
    kind: 's3' as const,
    endpoint: `http://127.0.0.1:${server.port}`,
    bucket: 'captures',
    region: 'us-east-1',
    accessKeyId: 'test',
    secretAccessKey: 'test',
    forcePathStyle: true,
  };
  const client = new S3Client({ ...settings, credentials: settings });
  const Bucket = settings.bucket;
  server.createBucket(Bucket);
  return {
    settings,
    /** Keys of all objects, at most 1000. */
    async keys(): Promise<string[]> {
      const { Contents = [] } = await client.send(new ListObjectsV2Command({ Bucket }));
      return Contents.map(({ Key }) => Key ?? '');
    },
    /** Empties the bucket. */
    empty: () => server.emptyBucket(Bucket),
    /** @throws unless the bucket holds neither an object nor a part of an upload: only then may it be deleted */
    async expectNothing(): Promise<void> {
      await client.send(new DeleteBucketCommand({ Bucket }));
      server.createBucket(Bucket);
    },
    async stop(): Promise<void> {
      client.destroy();
      await server.stop();
    },
  };
}
