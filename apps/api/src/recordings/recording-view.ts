import type { Channel, ChannelSummary, Recording } from '@overtally/contracts';
import { recordingNumber } from './recording-number.js';
import type { RecordingRow } from './recordings.repository.js';

/** A row of a recording with what was joined to it. */
export type RecordingRecord = RecordingRow & {
  duplicateOf: { id: string; number: number } | null;
  uploaderName: string;
};

/** The recording as the contract words it. */
export function toRecording(
  row: RecordingRecord,
  parts: { channels: Channel[]; latestAnalysisId: string | null; summaries: ChannelSummary[] },
): Recording {
  const { sampleRateHz, sampleCount } = row;
  return {
    id: row.id,
    projectId: row.projectId,
    number: recordingNumber(row.number),
    name: row.name,
    eut: row.eut,
    measuringChain: row.measuringChain,
    instrument: row.instrument,
    capturedAt: row.capturedAt?.toISOString() ?? null,
    remark: row.remark,
    status: row.status,
    progress: row.progress,
    problem: row.problem,
    warnings: row.warnings,
    file: { name: row.fileName, size: row.fileSize, sha256: row.fileSha256 },
    duplicateOf: row.duplicateOf && { ...row.duplicateOf, number: recordingNumber(row.duplicateOf.number) },
    format: row.format,
    metadata: row.metadata,
    import: row.importOptions,
    readingRule: row.readingRuleName === null ? null : { id: row.readingRuleId, name: row.readingRuleName },
    sampleRateHz,
    sampleCount,
    durationS: sampleRateHz === null || sampleCount === null ? null : sampleCount / sampleRateHz,
    ...parts,
    uploadedBy: { id: row.uploadedById, name: row.uploaderName },
    createdAt: row.createdAt.toISOString(),
  };
}
