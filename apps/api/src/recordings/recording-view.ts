import type {
  ChainRef,
  ChannelSummary,
  EquipmentRef,
  RecordedChannel,
  Recording,
} from '@overtally/contracts';
import { recordingNumber } from './recording-number.js';
import type { RecordingRow } from './recordings.repository.js';

/** A row of a recording with what was joined to it. */
export type RecordingRecord = RecordingRow & {
  duplicateOf: { id: string; number: number } | null;
  uploaderName: string;
  equipment: (Omit<EquipmentRef, 'retiredAt'> & { retiredAt: Date | null }) | null;
  operatingMode: { id: string; name: string; description: string; retiredAt: Date | null } | null;
};

/** The moment whose calibrations count for a recording: its capture, else its upload. */
export function momentOf({ capturedAt, createdAt }: Pick<RecordingRow, 'capturedAt' | 'createdAt'>): Date {
  return capturedAt ?? createdAt;
}

/** The recording as the contract words it. */
export function toRecording(
  row: RecordingRecord,
  parts: {
    chain: ChainRef | null;
    channels: RecordedChannel[];
    latestAnalysisId: string | null;
    summaries: ChannelSummary[];
  },
): Recording {
  const { sampleRateHz, sampleCount, equipment, operatingMode: mode } = row;
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
    equipment: equipment && { ...equipment, retiredAt: equipment.retiredAt?.toISOString() ?? null },
    operatingMode: mode && {
      ...{ id: mode.id, name: mode.name, description: mode.description },
      retired: mode.retiredAt !== null,
    },
    conditions: row.conditions,
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
