import {
  AbortMultipartUploadCommand,
  CompleteMultipartUploadCommand,
  CopyObjectCommand,
  CreateMultipartUploadCommand,
  UploadPartCopyCommand,
  type CompletedPart,
  type S3Client,
} from '@aws-sdk/client-s3';

/** The most that one CopyObject takes (Amazon S3 API reference, CopyObject). */
const singleCopyBytes = 5 * 2 ** 30;
/** At most 10,000 parts of 5 MiB to 5 GiB make an object (Amazon S3 user guide, multipart upload limits). */
const copyPartBytes = 2 ** 30;

interface Copy {
  bucket: string;
  from: string;
  to: string;
  /** Bytes of the object at `from`. */
  size: number;
}

/** Copies an object within its bucket at the store; the copy appears whole or not at all. */
export async function copyObject(client: Pick<S3Client, 'send'>, copy: Copy): Promise<void> {
  const { bucket: Bucket, to: Key, size } = copy;
  const CopySource = `${Bucket}/${copy.from}`;
  if (size <= singleCopyBytes) {
    await client.send(new CopyObjectCommand({ Bucket, Key, CopySource }));
    return;
  }
  const { UploadId } = await client.send(new CreateMultipartUploadCommand({ Bucket, Key }));
  try {
    const Parts: CompletedPart[] = [];
    for (let start = 0; start < size; start += copyPartBytes) {
      const PartNumber = Parts.length + 1;
      const CopySourceRange = `bytes=${start}-${Math.min(start + copyPartBytes, size) - 1}`;
      const part = { Bucket, Key, CopySource, CopySourceRange, UploadId, PartNumber };
      const { CopyPartResult } = await client.send(new UploadPartCopyCommand(part));
      Parts.push({ ETag: CopyPartResult?.ETag, PartNumber });
    }
    const MultipartUpload = { Parts };
    await client.send(new CompleteMultipartUploadCommand({ Bucket, Key, UploadId, MultipartUpload }));
  } catch (error) {
    await client.send(new AbortMultipartUploadCommand({ Bucket, Key, UploadId }));
    throw error;
  }
}
