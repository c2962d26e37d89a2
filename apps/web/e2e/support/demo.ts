import { projectPageSchema, recordingPageSchema } from '@overtally/contracts';
import type { Browser } from 'playwright-core';
import { signedInPage } from './browser.js';
import { personOf } from './product.js';

/** The demonstration's emission project with its phase-cut current, once everything in it is analysed. */
export async function analysedDemo(
  browser: Browser,
  baseUrl: string,
): Promise<{ projectId: string; recordingId: string; analysisId: string }> {
  const { context } = await signedInPage(browser, baseUrl, personOf('analyst'));
  const projects = projectPageSchema.parse(await (await context.request.get('/api/projects')).json());
  const projectId = projects.items.find(({ name }) => name.startsWith('Ostrel'))?.id ?? '';
  const deadline = Date.now() + 170_000;
  while (Date.now() < deadline) {
    const answer = await context.request.get(`/api/projects/${projectId}/recordings?limit=50`);
    const { items } = recordingPageSchema.parse(await answer.json());
    const phaseCut = items.find(({ file }) => file.name === 'dimmer-90deg.csv');
    if (phaseCut?.status === 'ready' && phaseCut.latestAnalysisId) {
      await context.close();
      return { projectId, recordingId: phaseCut.id, analysisId: phaseCut.latestAnalysisId };
    }
    await new Promise((resolve) => setTimeout(resolve, 500));
  }
  throw new Error('The phase-cut current of the demonstration was not analysed in time');
}
