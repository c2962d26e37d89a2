import {
  DeleteObjectCommand,
  DeleteObjectsCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  paginateListObjectsV2,
  S3Client,
  S3ServiceException,
  type GetObjectCommandOutput,
} from '@aws-sdk/client-s3';
import { Upload } from '@aws-sdk/lib-storage';
import { randomUUID } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { rm } from 'node:fs/promises';
import { Readable } from 'node:stream';
import type { S3Settings } from '../config/storage-settings.js';
import { copyObject } from './copy-object.js';
import { HashedPieces } from './hashed-pieces.js';
import { checkedKey, checkedPrefix } from './storage-key.js';
import {
  Storage,
  StorageObjectMissing,
  type ByteInput,
  type ByteRange,
  type StagedObject,
  type StoredObject,
} from './storage.js';

/** No key begins with a dot (`checkedKey`), so nobody can name what lies here. */
const stagingPrefix = '.staging/';
const staleAfterMs = 24 * 3600 * 1000;
/** Up to 10,000 parts make an object, 78 GiB in these; four parts are in memory while one uploads. */
const partBytes = 8 * 2 ** 20;
const connectMs = 5_000;
/** A store that sends nothing for so long has broken off. */
const silenceMs = 120_000;

/**
 * Objects in a bucket of a store that speaks the protocol of S3.
 *
 * What has no name yet goes to a staging key of the bucket; `commit` copies it at the store and deletes it. Uploads are
 * committed inside a transaction, which a copy at the store holds open for seconds at most; a local spool would have to
 * be sent to the store then, and the machine would need room for every upload under way.
 *
 * Put, copied and multipart objects appear whole or not at all by the protocol; parts of an upload that fails are
 * dropped at the store. Those of a process that was killed remain, unseen, until a lifecycle rule of the bucket
 * (AbortIncompleteMultipartUpload) removes them.
 */
export class S3Storage extends Storage {
  private readonly client: S3Client;
  private readonly bucket: string;

  constructor(private readonly settings: S3Settings) {
    super();
    const { endpoint, region, forcePathStyle, accessKeyId, secretAccessKey } = settings;
    this.bucket = settings.bucket;
    this.client = new S3Client({
      endpoint,
      region,
      forcePathStyle,
      credentials: { accessKeyId, secretAccessKey },
      requestHandler: { connectionTimeout: connectMs, socketTimeout: silenceMs },
      // The body of an answer is then the connection itself, which is closed with it.
      responseChecksumValidation: 'WHEN_REQUIRED',
    });
  }

  async prepare(now = Date.now()): Promise<void> {
    try {
      await this.client.send(new HeadBucketCommand({ Bucket: this.bucket }));
    } catch (error) {
      const place = `The bucket ${this.bucket} at ${this.settings.endpoint} cannot be used`;
      throw new Error(`${place}: ${bucketFault(error)}`, { cause: error });
    }
    for await (const page of this.pages(stagingPrefix)) {
      await this.deleteKeys(
        page.filter(({ writtenAt }) => now - writtenAt >= staleAfterMs).map(({ key }) => key),
      );
    }
  }

  async stage(source: ByteInput): Promise<StagedObject> {
    const stagingKey = `${stagingPrefix}${randomUUID()}`;
    const received = await this.upload(stagingKey, source);
    const discard = () => this.deleteKeys([stagingKey]);
    const commit = async (key: string) => {
      const copy = { bucket: this.bucket, from: stagingKey, to: checkedKey(key), size: received.size };
      await copyObject(this.client, copy);
      await discard();
    };
    return { ...received, commit, discard };
  }

  async stageFile(localPath: string): Promise<StagedObject> {
    const staged = await this.stage(createReadStream(localPath, { highWaterMark: 2 ** 20 }));
    const commit = async (key: string) => {
      await staged.commit(key);
      await rm(localPath, { force: true });
    };
    return { ...staged, commit };
  }

  async put(key: string, source: ByteInput): Promise<{ size: number; sha256: string }> {
    return this.upload(checkedKey(key), source);
  }

  async putFile(key: string, localPath: string): Promise<void> {
    await this.upload(checkedKey(key), createReadStream(localPath, { highWaterMark: 2 ** 20 }));
    await rm(localPath, { force: true });
  }

  async read(key: string, range?: ByteRange): Promise<Readable> {
    const answer = await this.get(key, range);
    return answer === undefined ? Readable.from([]) : bodyOf(answer);
  }

  async readBytes(key: string, range?: ByteRange): Promise<Uint8Array> {
    const answer = await this.get(key, range);
    if (answer === undefined) return new Uint8Array(0);
    const bytes = new Uint8Array(answer.ContentLength ?? 0);
    let filled = 0;
    for await (const chunk of bodyOf(answer) as AsyncIterable<Uint8Array>) {
      bytes.set(chunk, filled);
      filled += chunk.length;
    }
    if (filled !== bytes.length) throw new Error('The stored object ends early');
    return bytes;
  }

  async size(key: string): Promise<number> {
    const command = new HeadObjectCommand({ Bucket: this.bucket, Key: checkedKey(key) });
    const { ContentLength } = await orMissing(key, this.client.send(command));
    if (ContentLength === undefined) throw new Error(`The store does not tell the size of ${key}`);
    return ContentLength;
  }

  async delete(key: string): Promise<void> {
    await this.client.send(new DeleteObjectCommand({ Bucket: this.bucket, Key: checkedKey(key) }));
  }

  async deleteAll(prefix: string): Promise<void> {
    for await (const page of this.pages(checkedPrefix(prefix)))
      await this.deleteKeys(page.map(({ key }) => key));
  }

  async *list(prefix: string): AsyncIterable<StoredObject> {
    for await (const page of this.pages(checkedPrefix(prefix))) yield* page;
  }

  private async upload(key: string, source: ByteInput): Promise<{ size: number; sha256: string }> {
    const hashed = new HashedPieces(source);
    const upload = new Upload({
      client: this.client,
      params: { Bucket: this.bucket, Key: key, Body: Readable.from(hashed.pieces(), { objectMode: false }) },
      partSize: partBytes,
    });
    await upload.done();
    return hashed.result();
  }

  /** The answer with the bytes; undefined when the range holds none, which the protocol answers with an error. */
  private async get(key: string, range?: ByteRange): Promise<GetObjectCommandOutput | undefined> {
    const command = { Bucket: this.bucket, Key: checkedKey(key) };
    if (range === undefined) return orMissing(key, this.client.send(new GetObjectCommand(command)));
    if (range.end < range.start) {
      await this.size(key);
      return undefined;
    }
    try {
      const Range = `bytes=${range.start}-${range.end}`;
      return await orMissing(key, this.client.send(new GetObjectCommand({ ...command, Range })));
    } catch (error) {
      if (error instanceof S3ServiceException && error.$metadata.httpStatusCode === 416) return undefined;
      throw error;
    }
  }

  /** Objects by the thousand, as a request to list or to delete takes them. */
  private async *pages(prefix: string): AsyncIterable<StoredObject[]> {
    const request = { Bucket: this.bucket, Prefix: prefix };
    for await (const { Contents } of paginateListObjectsV2({ client: this.client }, request)) {
      yield (Contents ?? []).flatMap(({ Key, LastModified }) =>
        Key === undefined || LastModified === undefined
          ? []
          : [{ key: Key, writtenAt: LastModified.getTime() }],
      );
    }
  }

  /** @param keys at most 1000 */
  private async deleteKeys(keys: string[]): Promise<void> {
    if (keys.length === 0) return;
    const Delete = { Objects: keys.map((Key) => ({ Key })), Quiet: true };
    const { Errors = [] } = await this.client.send(new DeleteObjectsCommand({ Bucket: this.bucket, Delete }));
    const [first] = Errors;
    if (first === undefined) return;
    throw new Error(`${Errors.length} objects could not be deleted; ${first.Key}: ${first.Message}`);
  }
}

function bodyOf({ Body }: GetObjectCommandOutput): Readable {
  if (Body instanceof Readable) return Body;
  throw new Error('The store answered without bytes');
}

function bucketFault(error: unknown): string {
  const status = error instanceof S3ServiceException ? error.$metadata.httpStatusCode : undefined;
  if (status === 404) return 'it does not exist; make it, or correct S3_BUCKET';
  if (status === 403) return 'access is denied; check S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY and its policy';
  if (status === 301) return 'it lies elsewhere; check S3_ENDPOINT and S3_REGION';
  return `${error instanceof Error ? error.message : String(error)}; check S3_ENDPOINT`;
}

async function orMissing<T>(key: string, work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (error instanceof S3ServiceException && (error.name === 'NoSuchKey' || error.name === 'NotFound'))
      throw new StorageObjectMissing(key);
    throw error;
  }
}
