import { setTimeout as wait } from 'node:timers/promises';
import { expect, it } from 'vitest';
import { AnalysesService } from './analyses.service.js';

/** An analysis whose figures are kept while its state is being read. */
class RepositoryDuringTheEnd {
  private isDone = false;

  async find() {
    await wait(5);
    this.isDone = true;
    return { id: 'a', status: 'done', createdAt: new Date(0), finishedAt: new Date(1) };
  }

  channelsOf = () => Promise.resolve(this.isDone ? [{ index: 0, windows: null, flags: [] }] : []);
  harmonicsOf = () => Promise.resolve(this.isDone ? [{ channelIndex: 0, order: 1 }] : []);
}

it('says that an analysis is done only together with its figures', async () => {
  const unused = {} as never;
  const service = new AnalysesService(unused, new RepositoryDuringTheEnd() as never, unused, unused);
  const { status, channels } = await service.get('a');
  expect(status).toBe('done');
  expect(channels).toMatchObject([{ index: 0, harmonics: [{ order: 1 }] }]);
});
