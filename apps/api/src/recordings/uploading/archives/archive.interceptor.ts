import { Injectable } from '@nestjs/common';
import multer from 'multer';
import { rm } from 'node:fs/promises';
import { FormInterceptor } from '../form.interceptor.js';
import { UploadLimitsService } from '../upload-limits.service.js';
import { UploadSpool } from '../upload-spool.js';

/** Receives an archive of a form into the spool: its directory stands at its end, so it must lie somewhere to be read. */
@Injectable()
export class ArchiveInterceptor extends FormInterceptor {
  constructor(limits: UploadLimitsService, spool: UploadSpool) {
    const engine = multer.diskStorage({
      destination: spool.folder,
      filename: (_request, _file, done) => done(null, spool.strayName()),
    });
    super(engine, limits, spool, true);
  }

  protected discard({ path }: Express.Multer.File): Promise<void> {
    return rm(path, { force: true });
  }
}
