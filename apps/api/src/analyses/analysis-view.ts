import type { Analysis, ChannelAnalysis } from '@overtally/contracts';
import { grouped } from '../recordings/grouped.js';
import { completed } from './completed-channel.js';
import type { AnalysisChannelRow, AnalysisRecord, HarmonicRow } from './analyses.repository.js';

/** The analysis as the contract words it, without its figures. */
export function toAnalysisHead(row: AnalysisRecord): Omit<Analysis, 'channels' | 'power' | 'threePhase'> {
  return {
    id: row.id,
    recordingId: row.recordingId,
    projectId: row.projectId,
    status: row.status,
    progress: row.progress,
    problem: row.problem,
    engineVersion: row.engineVersion,
    settings: row.settings,
    supersededById: row.supersededById,
    startedBy: { id: row.startedById, name: row.starterName },
    createdAt: row.createdAt.toISOString(),
    finishedAt: row.finishedAt?.toISOString() ?? null,
  };
}

/** The analysis as the contract words it. */
export function toAnalysis(
  row: AnalysisRecord,
  channels: AnalysisChannelRow[],
  orders: HarmonicRow[],
): Analysis {
  const byChannel = grouped(orders, (order) => order.channelIndex);
  return {
    ...toAnalysisHead(row),
    channels: channels.map((channel) => toChannel(channel, byChannel.get(channel.index) ?? [])),
    power: row.power,
    threePhase: row.threePhase,
  };
}

function toChannel(row: AnalysisChannelRow, orders: HarmonicRow[]): ChannelAnalysis {
  const { analysisId: _id, seriesKey: _seriesKey, series: _series, ...figures } = row;
  const { spectrumKey: _spectrumKey, spectrumWindow: _window, ...rest } = figures;
  const { spectrumStartHz: _start, spectrumStepHz: _step, ...others } = rest;
  const { spectrumNoiseBandwidthHz: _bandwidth, spectrumSegments: _segments, ...channel } = others;
  return completed({
    ...channel,
    harmonics: orders.map(({ analysisId: _analysis, channelIndex: _channel, ...order }) => order),
  });
}
