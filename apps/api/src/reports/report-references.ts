import { idSchema, type ReportContent, type ReportSection, type ReportStudy } from '@overtally/contracts';
import type { schema } from '@overtally/db';

type Kind = (typeof schema.reportReferences.$inferInsert)['kind'];

export interface ReportReference {
  targetId: string;
  kind: Kind;
}

/** Everything that a report speaks of and that must stay as long as the report, each once. */
export function referencesOf(content: ReportContent): ReportReference[] {
  const all = [
    ...content.sections.flatMap(referencesOfSection),
    ...content.studies.flatMap(referencesOfStudy),
  ];
  return [...new Map(all.map((reference) => [reference.targetId, reference])).values()];
}

function referencesOfSection(section: ReportSection): ReportReference[] {
  const { verdict, chain } = section;
  const instruments = chain?.instruments ?? [];
  const named: [Kind, (string | undefined)[]][] = [
    ['recording', [section.recording.id, ...verdict.repeats.map(({ recordingId }) => recordingId)]],
    ['analysis', [section.analysis.id, ...verdict.repeats.map(({ analysisId }) => analysisId)]],
    ['note', section.notes.map(({ id }) => id)],
    // A published set lies in the program and has a name, not a UUID.
    ['limit-set', [idSchema.safeParse(verdict.limitSetId).data]],
    ['equipment', [section.equipment?.id]],
    ['operating-mode', [section.operatingMode?.id]],
    ['measuring-chain', [chain?.id]],
    ['instrument', instruments.map(({ id }) => id)],
    ['calibration', instruments.map(({ calibration }) => calibration?.id)],
  ];
  return referencesTo(named);
}

function referencesOfStudy({ id, versionId, source, limitSet }: ReportStudy): ReportReference[] {
  return referencesTo([
    ['study', [id]],
    ['study-version', [versionId]],
    ['recording', [source.recordingId ?? undefined]],
    ['analysis', [source.analysisId ?? undefined]],
    ['limit-set', [idSchema.safeParse(limitSet?.id).data]],
  ]);
}

function referencesTo(named: readonly [Kind, (string | undefined)[]][]): ReportReference[] {
  return named.flatMap(([kind, ids]) =>
    ids.filter((id) => id !== undefined).map((targetId) => ({ targetId, kind })),
  );
}
