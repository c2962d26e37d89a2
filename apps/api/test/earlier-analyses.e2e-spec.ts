import type { Analysis, Report, ReportContent } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newFinishedAnalysis } from './support/finished-analysis.js';
import { newInReview, newJudged } from './support/judged-reports.js';
import { startTestApp, type TestApp } from './support/test-app.js';

/** What engine 0.1.0 stored of windows and flags. */
const windows = { cycles: 10, count: 150, samplesPerWindow: 10_004 };
const flags = [{ code: 'dc-heavy', severity: 'warning', message: 'DC' }];

/** The same, as the contract words it today: nothing invented. */
const completed = {
  flags: [{ ...flags[0], evidence: null }],
  windows: { ...windows, flaggedCount: 0, synchronisationErrorPercent: null, gridChannel: 0 },
  ...{ tone: null, distortion: null, lines: [], uncertainty: {} },
};

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
});
afterAll(() => test.close());

describe('an analysis of an earlier engine', () => {
  it('stays readable, with nothing where nothing was kept', async () => {
    const technician = await test.signIn('technician');
    const owner = { projectId: test.project.id, userId: test.people.technician.id };
    const { analysisId } = await newFinishedAnalysis(test.database, owner);
    // As the migration leaves rows that were there before.
    await test.database
      .update(schema.analysisChannels)
      .set({ windows: windows as never, flags: flags as never })
      .where(eq(schema.analysisChannels.analysisId, analysisId));
    const path = `/api/analyses/${analysisId}`;
    const { body } = (await technician.get(path).expect(200)) as { body: Analysis };
    expect(body).toMatchObject({ power: [], threePhase: [] });
    expect(body.channels[0]).toMatchObject(completed);
    const series = await technician.get(`${path}/series`).expect(404);
    expect(series.body.code).toBe('no-series');
    const density = await technician.get(`${path}/spectrum`).query({ scaling: 'density' }).expect(409);
    expect(density.body.code).toBe('no-noise-bandwidth');
  });

  it('stays readable in a report that was frozen then', async () => {
    const { verdict } = await newJudged(test);
    const { id, content } = await newInReview(test, [verdict.id]);
    await test.database
      .update(schema.reports)
      .set({ content: asFrozenEarlier(content) })
      .where(eq(schema.reports.id, id));
    const analyst = await test.signIn('analyst');
    const { body } = (await analyst.get(`/api/reports/${id}`).expect(200)) as { body: Report };
    expect(body.content.sections[0]!.analysis.channel).toMatchObject(completed);
    await analyst.get(`/api/reports/${id}/pdf`).expect(200);
  });
});

function asFrozenEarlier(content: ReportContent): ReportContent {
  const fields = ['tone', 'distortion', 'bands', 'countedFrequency', 'lines', 'families', 'uncertainty'];
  const sections = content.sections.map((section) => {
    const kept = Object.entries(section.analysis.channel).filter(([name]) => !fields.includes(name));
    const harmonics = section.analysis.channel.harmonics.map(
      ({ uncertainty: _uncertainty, groupStatistics: _group, subgroupStatistics: _subgroup, ...order }) =>
        order,
    );
    const channel = { ...Object.fromEntries(kept), harmonics, windows, flags };
    return { ...section, analysis: { ...section.analysis, channel } };
  });
  return { ...content, sections } as unknown as ReportContent;
}
