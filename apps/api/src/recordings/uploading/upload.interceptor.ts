import { Injectable } from '@nestjs/common';
import { AppConfig } from '../../config/app-config.js';
import { Storage } from '../../storage/storage.js';
import { FormInterceptor } from './form.interceptor.js';
import { StagingEngine, type StagedFile } from './staging-engine.js';
import { UploadLimitsService } from './upload-limits.service.js';
import { UploadSpool } from './upload-spool.js';

/** Receives a capture of a form straight into storage. */
@Injectable()
export class UploadInterceptor extends FormInterceptor {
  constructor(storage: Storage, limits: UploadLimitsService, spool: UploadSpool, config: AppConfig) {
    super(new StagingEngine(storage), limits, spool, config.storage.kind === 'disk');
  }

  protected discard(file: StagedFile): Promise<void> {
    return file.staged.discard();
  }
}
