import {
  Injectable,
  Logger,
  type BeforeApplicationShutdown,
  type OnApplicationBootstrap,
} from '@nestjs/common';
import { demoCapturePath } from '@overtally/fixtures';
import { createReadStream } from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';
import { RecordingsService } from '../recordings/recordings.service.js';
import { Storage } from '../storage/storage.js';
import { DemoAccounts, type PendingCapture } from './demo-accounts.js';
import { DemoBench } from './demo-bench.js';
import { DemoJudgements } from './demo-judgements.js';

const askAgainMs = 1_000;

/** Fills a new installation with people, projects and captures to look at. */
@Injectable()
export class DemoService implements OnApplicationBootstrap, BeforeApplicationShutdown {
  private readonly logger = new Logger('Demo');
  private filling: Promise<void> = Promise.resolve();
  private stopped = false;

  constructor(
    private readonly accounts: DemoAccounts,
    private readonly judgements: DemoJudgements,
    private readonly bench: DemoBench,
    private readonly recordings: RecordingsService,
    private readonly storage: Storage,
  ) {}

  /** People can sign in as soon as the process answers; captures and verdicts come in meanwhile. */
  async onApplicationBootstrap(): Promise<void> {
    if (await this.accounts.make()) this.logger.log('People and projects of the demonstration were made');
    this.filling = this.fill().catch((error: unknown) =>
      this.logger.error({ err: error }, 'Filling the projects of the demonstration failed'),
    );
  }

  async beforeApplicationShutdown(): Promise<void> {
    this.stopped = true;
    await this.filling;
  }

  private async fill(): Promise<void> {
    const captures = await this.accounts.pending();
    if (captures.length > 0) await this.bench.nameLaboratory();
    for (const pending of captures) {
      if (this.stopped) return;
      await this.upload(pending);
    }
    while (!this.stopped && !(await this.judgements.make())) await wait(askAgainMs);
  }

  /** The same way as over HTTP: streamed into storage, then read and analysed by the queue. */
  private async upload(pending: PendingCapture): Promise<void> {
    const { projectId, uploadedById, capture } = pending;
    const { fileName, ...words } = capture;
    const fields = { ...words, ...(await this.bench.saidOf(pending)) };
    const staged = await this.storage.stage(createReadStream(demoCapturePath(fileName)));
    try {
      await this.recordings.upload({ projectId, uploadedById, fileName, staged, fields });
    } finally {
      await staged.discard();
    }
  }
}
