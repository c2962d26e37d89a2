import type { CallHandler, ExecutionContext, NestInterceptor } from '@nestjs/common';
import type { UploadLimits } from '@overtally/contracts';
import type { Response } from 'express';
import multer, { MulterError, type StorageEngine } from 'multer';
import { from, lastValueFrom, type Observable } from 'rxjs';
import { problem } from '../../common/problem.js';
import type { AppRequest } from '../../common/request.js';
import { formLimits } from './form-limits.js';
import { fileTooLarge, quotaExceeded, type UploadLimitsService } from './upload-limits.service.js';
import type { UploadSpool } from './upload-spool.js';

/** Receives the field `file` of a multipart request by an engine; whatever is not put to use is dropped again. */
export abstract class FormInterceptor implements NestInterceptor {
  constructor(
    private readonly engine: StorageEngine,
    private readonly limits: UploadLimitsService,
    private readonly spool: UploadSpool,
    private readonly liesOnDisk: boolean,
  ) {}

  /** Drops a file that was received, unless it was put to use. */
  protected abstract discard(file: Express.Multer.File): Promise<void>;

  async intercept(context: ExecutionContext, next: CallHandler): Promise<Observable<unknown>> {
    const request = context.switchToHttp().getRequest<AppRequest>();
    const response = context.switchToHttp().getResponse<Response>();
    const limits = await this.limits.of(request.access!.projectId);
    if (this.liesOnDisk) await this.spool.demandRoom(Number(request.headers['content-length'] ?? 0));
    const receive = multer({
      storage: this.engine,
      defParamCharset: 'utf8',
      limits: { ...formLimits, fileSize: Math.min(limits.maxFileBytes, quotaLeft(limits)) },
    }).single('file');
    await new Promise<void>((resolve, reject) => {
      receive(request, response, (error: unknown) =>
        error === undefined ? resolve() : reject(refusal(error, limits)),
      );
    });
    const reply = lastValueFrom(next.handle(), { defaultValue: undefined });
    return from(reply.finally(() => request.file && this.discard(request.file)));
  }
}

function quotaLeft({ quotaBytes, usedBytes }: UploadLimits): number {
  return quotaBytes === null ? Infinity : Math.max(0, quotaBytes - usedBytes);
}

function refusal(error: unknown, limits: UploadLimits): Error {
  if (error instanceof MulterError && error.code === 'LIMIT_FILE_SIZE') {
    const { maxFileBytes, quotaBytes, usedBytes } = limits;
    return quotaBytes === null || quotaLeft(limits) >= maxFileBytes
      ? fileTooLarge(maxFileBytes)
      : quotaExceeded(quotaBytes, usedBytes);
  }
  if (error instanceof MulterError) {
    const path = error.field ?? 'file';
    return problem(400, 'invalid-upload', `${error.message}; send the capture as one part named file`, [
      { path, message: error.message },
    ]);
  }
  return isBrokenMultipart(error)
    ? problem(400, 'invalid-upload', `The multipart body cannot be read: ${error.message}`)
    : (error as Error);
}

/** The multipart parser tells its refusals apart from failures of the store by their words alone. */
function isBrokenMultipart(error: unknown): error is Error {
  const words = /multipart|boundary|unexpected end of form|malformed|broken off|request (aborted|closed)/i;
  return error instanceof Error && words.test(error.message);
}
