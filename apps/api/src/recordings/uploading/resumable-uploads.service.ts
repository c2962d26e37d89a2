import { Injectable } from '@nestjs/common';
import { Server, type Upload } from '@tus/server';
import type { Response as Reply } from 'express';
import { randomUUID } from 'node:crypto';
import { Readable } from 'node:stream';
import { problem, ProblemException } from '../../common/problem.js';
import type { AppRequest } from '../../common/request.js';
import { AppConfig } from '../../config/app-config.js';
import { UploadLimitsService } from './upload-limits.service.js';
import { UploadSpool, type UploadOwner } from './upload-spool.js';

/** Bytes of a request that wait to be written. */
const waitingBytes = 256 * 1024;
/** Headers of the protocol; others of a request are no business of it. */
const protocolHeader = /^(tus-|upload-|content-type$|content-length$)/;
/** The protocol server speaks of other origins too; only our own pages may ask. */
const notPassedOn = /^access-control-/;

interface Asked {
  owner: UploadOwner;
  uploadId?: string;
  /** Why it was refused, in our own words. */
  failure?: unknown;
}

/** The resumable upload protocol tus 1.0 (core, creation, creation-with-upload, termination, expiration). */
@Injectable()
export class ResumableUploadsService {
  private readonly server: Server;
  private readonly asked = new WeakMap<object, Asked>();

  constructor(
    private readonly spool: UploadSpool,
    private readonly limits: UploadLimitsService,
    config: AppConfig,
  ) {
    this.server = new Server({
      path: '/uploads',
      datastore: spool.store(),
      locker: spool.locks,
      allowedOrigins: () => false,
      // Told to who asks; when an upload is created the limit is checked with its figures.
      maxSize: (request) => (request.method === 'OPTIONS' ? config.maxUploadBytes : 0),
      namingFunction: () => randomUUID(),
      getFileIdFromRequest: (request) => this.of(request).uploadId,
      // Relative to the collection, so that it holds behind any proxy (RFC 9110, 10.2.2).
      generateUrl: (_request, { id }) => `uploads/${id}`,
      onIncomingRequest: (request) => this.demandOwn(this.of(request)),
      onUploadCreate: (request, upload) => this.admit(this.of(request), upload),
      onResponseError: (request, error) => {
        this.of(request).failure = error;
        return undefined;
      },
    });
  }

  /**
   * Answers one request of the protocol.
   * @throws ProblemException for every refusal
   */
  async answer(request: AppRequest, reply: Reply, owner: UploadOwner, uploadId?: string): Promise<void> {
    const asked: Asked = { owner, uploadId };
    const passed = passedOn(request);
    this.asked.set(passed, asked);
    const answer = await this.server.handleWeb(passed);
    const headers = Object.fromEntries([...answer.headers].filter(([name]) => !notPassedOn.test(name)));
    if (answer.status >= 400) throw refusal(answer.status, await answer.text(), asked.failure, headers);
    reply.status(answer.status).set(headers).end();
  }

  private of(request: object): Asked {
    const asked = this.asked.get(request);
    if (asked === undefined) throw new Error('A request of the protocol came in by another way');
    return asked;
  }

  private async demandOwn({ uploadId, owner }: Asked): Promise<void> {
    if (uploadId === undefined) return;
    if ((await this.spool.find(uploadId, owner)) === undefined) throw noSuchUpload();
  }

  private async admit({ owner }: Asked, upload: Upload): Promise<{ metadata: Upload['metadata'] }> {
    const size = upload.size ?? 0;
    await this.limits.admit(owner.projectId, size);
    await this.spool.demandRoom(size);
    return { metadata: { ...upload.metadata, ...owner } };
  }
}

export function noSuchUpload(): ProblemException {
  return problem(404, 'not-found', 'There is no such upload of yours in this project; send the file again');
}

/** The request as the protocol server takes it, with no more of the body in memory than is being written. */
function passedOn(request: AppRequest): Request {
  const headers = new Headers();
  for (const [name, value] of Object.entries(request.headers))
    if (typeof value === 'string' && protocolHeader.test(name)) headers.set(name, value);
  const { method } = request;
  const hasBody = method === 'PATCH' || method === 'POST';
  const strategy = new ByteLengthQueuingStrategy({ highWaterMark: waitingBytes });
  return new Request(new URL('http://server/uploads'), {
    method,
    headers,
    ...(hasBody && { body: Readable.toWeb(request, { strategy }), duplex: 'half' }),
  });
}

function refusal(
  status: number,
  text: string,
  failure: unknown,
  { 'content-type': _type, 'content-length': _length, ...headers }: Record<string, string>,
): unknown {
  if (failure instanceof ProblemException)
    return new ProblemException(failure.getStatus(), failure.code, failure.detail, failure.errors, headers);
  if (failure instanceof Error) return failure;
  const detail = text.trim().replace(/\.$/, '');
  return new ProblemException(status, 'upload-protocol', `${detail} (tus 1.0)`, undefined, headers);
}
