import type { Study, StudyListItem } from '@overtally/contracts';
import type { StudyListRow, StudyRow, StudyVersionHead, StudyVersionRow } from './studies.repository.js';

/** Number of a study as people write it: S-0001. */
export const studyNumber = (number: number): string => `S-${String(number).padStart(4, '0')}`;

export function toStudy(row: StudyRow, version: StudyVersionRow, versions: StudyVersionHead[]): Study {
  return {
    ...{ id: row.id, projectId: row.projectId, number: studyNumber(row.number), name: row.name },
    ...{ version: version.version, versionId: version.id },
    versions: versions.map(({ authorId, authorName, createdAt, ...head }) => ({
      ...head,
      author: { id: authorId, name: authorName },
      createdAt: createdAt.toISOString(),
    })),
    ...{ definition: version.definition, series: version.series, result: version.result },
    retiredAt: row.retiredAt?.toISOString() ?? null,
    createdAt: row.createdAt.toISOString(),
  };
}

export function toStudyListItem({ authorId, authorName, ...row }: StudyListRow): StudyListItem {
  return {
    ...row,
    number: studyNumber(row.number),
    retiredAt: row.retiredAt?.toISOString() ?? null,
    createdAt: row.createdAt.toISOString(),
    savedAt: row.savedAt.toISOString(),
    author: { id: authorId, name: authorName },
  };
}
