import type { ChannelAnalysis, CreateVerdict } from '@overtally/contracts';
import { schema, type Database } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { newAnalysis, newRecording, type Owner } from './project-contents.js';
import { dimmerChannel } from './report-example.js';

const { analyses, analysisChannels, harmonics, recordings } = schema;

export interface Judgeable {
  recordingId: string;
  analysisId: string;
}

/** A recording that is ready, with an analysis that is done and has the given channels. */
export async function newFinishedAnalysis(
  database: Database,
  owner: Owner,
  channels: ChannelAnalysis[] = [dimmerChannel()],
  recording: Partial<typeof recordings.$inferInsert> = {},
): Promise<Judgeable> {
  const { id: recordingId } = await newRecording(database, owner);
  await database
    .update(recordings)
    .set({ status: 'ready', progress: 1, sampleRateHz: 50_000, sampleCount: 1_500_000, ...recording })
    .where(eq(recordings.id, recordingId));
  const { id: analysisId } = await newAnalysis(database, recordingId, owner);
  await database
    .update(analyses)
    .set({
      status: 'done',
      progress: 1,
      engineVersion: '1.0.0',
      finishedAt: new Date('2026-11-26T14:31:02Z'),
    })
    .where(eq(analyses.id, analysisId));
  for (const channel of channels) await insertChannel(database, analysisId, channel);
  return { recordingId, analysisId };
}

async function insertChannel(
  database: Database,
  analysisId: string,
  channel: ChannelAnalysis,
): Promise<void> {
  const { harmonics: orders, ...figures } = channel;
  await database.insert(analysisChannels).values({
    ...figures,
    analysisId,
    spectrumKey: `analyses/${analysisId}/channel-${channel.index}.npy`,
    spectrumWindow: 'hann',
    spectrumStartHz: 0,
    spectrumStepHz: 1,
  });
  if (orders.length === 0) return;
  await database
    .insert(harmonics)
    .values(orders.map((order) => ({ ...order, analysisId, channelIndex: channel.index })));
}

/** Body of a request for a verdict by IEC 61000-3-2, class A. */
export const classAVerdict = (given: Partial<CreateVerdict> = {}): Partial<CreateVerdict> => ({
  limitSetId: 'iec61000-3-2.classA',
  channel: 0,
  ...given,
});
