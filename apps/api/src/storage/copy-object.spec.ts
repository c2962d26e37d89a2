import type { S3Client } from '@aws-sdk/client-s3';
import { expect, it } from 'vitest';
import { copyObject } from './copy-object.js';

interface Sent {
  name: string;
  input: Record<string, unknown>;
}

/** A store that writes down what is asked of it; `failAt` names the part that it refuses. */
function recorder(failAt?: number) {
  const sent: Sent[] = [];
  const send = (command: { constructor: { name: string }; input: Record<string, unknown> }) => {
    const { PartNumber } = command.input;
    sent.push({ name: command.constructor.name, input: command.input });
    if (PartNumber !== undefined && PartNumber === failAt) return Promise.reject(new Error('refused'));
    return Promise.resolve({ UploadId: 'upload', CopyPartResult: { ETag: `etag-${String(PartNumber)}` } });
  };
  return { sent, client: { send } as unknown as S3Client };
}

const GiB = 2 ** 30;
const copy = { bucket: 'captures', from: '.staging/x', to: 'kept.bin' };

// 5 GiB is the most that CopyObject takes: Amazon S3 API reference.
it('copies up to 5 GiB at once', async () => {
  const { sent, client } = recorder();
  await copyObject(client, { ...copy, size: 5 * GiB });
  expect(sent).toEqual([
    {
      name: 'CopyObjectCommand',
      input: { Bucket: 'captures', Key: 'kept.bin', CopySource: 'captures/.staging/x' },
    },
  ]);
});

it('copies more in parts that join without gap', async () => {
  const { sent, client } = recorder();
  await copyObject(client, { ...copy, size: 5 * GiB + 1 });
  const parts = sent.filter(({ name }) => name === 'UploadPartCopyCommand').map(({ input }) => input);
  expect(parts.map(({ CopySourceRange }) => CopySourceRange)).toEqual([
    'bytes=0-1073741823',
    'bytes=1073741824-2147483647',
    'bytes=2147483648-3221225471',
    'bytes=3221225472-4294967295',
    'bytes=4294967296-5368709119',
    'bytes=5368709120-5368709120',
  ]);
  expect(sent.at(-1)).toEqual({
    name: 'CompleteMultipartUploadCommand',
    input: {
      ...{ Bucket: 'captures', Key: 'kept.bin', UploadId: 'upload' },
      MultipartUpload: {
        Parts: [1, 2, 3, 4, 5, 6].map((PartNumber) => ({ PartNumber, ETag: `etag-${PartNumber}` })),
      },
    },
  });
});

it('drops the parts of a copy that fails', async () => {
  const { sent, client } = recorder(2);
  await expect(copyObject(client, { ...copy, size: 6 * GiB })).rejects.toThrow('refused');
  expect(sent.map(({ name }) => name)).toEqual([
    'CreateMultipartUploadCommand',
    'UploadPartCopyCommand',
    'UploadPartCopyCommand',
    'AbortMultipartUploadCommand',
  ]);
});
