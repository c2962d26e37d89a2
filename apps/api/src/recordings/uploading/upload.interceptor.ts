import { Injectable, type CallHandler, type ExecutionContext, type NestInterceptor } from '@nestjs/common';
import type { Response } from 'express';
import multer, { MulterError } from 'multer';
import { from, lastValueFrom, type Observable } from 'rxjs';
import { problem } from '../../common/problem.js';
import type { AppRequest } from '../../common/request.js';
import { AppConfig } from '../../config/app-config.js';
import { Storage } from '../../storage/storage.js';
import { formLimits } from './form-limits.js';
import { StagingEngine, type StagedFile } from './staging-engine.js';

/** Receives the field `file` of a multipart request into storage; whatever is not put to use is dropped again. */
@Injectable()
export class UploadInterceptor implements NestInterceptor {
  private readonly receive: ReturnType<multer.Multer['single']>;

  constructor(
    storage: Storage,
    private readonly config: AppConfig,
  ) {
    this.receive = multer({
      storage: new StagingEngine(storage),
      defParamCharset: 'utf8',
      limits: { ...formLimits, fileSize: config.maxUploadBytes },
    }).single('file');
  }

  async intercept(context: ExecutionContext, next: CallHandler): Promise<Observable<unknown>> {
    const request = context.switchToHttp().getRequest<AppRequest & { file?: StagedFile }>();
    const response = context.switchToHttp().getResponse<Response>();
    await new Promise<void>((resolve, reject) => {
      this.receive(request, response, (error: unknown) =>
        error === undefined ? resolve() : reject(this.refusal(error)),
      );
    });
    const reply = lastValueFrom(next.handle(), { defaultValue: undefined });
    return from(reply.finally(() => request.file?.staged.discard()));
  }

  private refusal(error: unknown): Error {
    if (error instanceof MulterError && error.code === 'LIMIT_FILE_SIZE') {
      const limit = `${Math.floor(this.config.maxUploadBytes / (1024 * 1024))} MiB (${this.config.maxUploadBytes} bytes)`;
      return problem(
        413,
        'file-too-large',
        `The file is larger than the limit of this installation, ${limit}. Cut the capture, or have the limit raised`,
      );
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
}

/** The multipart parser tells its refusals apart from failures of the store by their words alone. */
function isBrokenMultipart(error: unknown): error is Error {
  const words = /multipart|boundary|unexpected end of form|malformed|broken off|request (aborted|closed)/i;
  return error instanceof Error && words.test(error.message);
}
