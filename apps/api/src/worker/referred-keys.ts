import { schema, type Database } from '@overtally/db';
import { and, inArray } from 'drizzle-orm';

const { analyses, analysisChannels, calibrations, channels, recordings, reports } = schema;

/** Beginnings of all keys that the product makes. */
export const keyPrefixes = ['calibrations/', 'projects/', 'recordings/', 'reports/'] as const;

const uuid = '([0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12})';
const source = new RegExp(`^projects/${uuid}/sources/([0-9a-f]{64})$`);
const reading = new RegExp(`^recordings/${uuid}/reads/${uuid}/`);
const analysis = new RegExp(`^recordings/${uuid}/analyses/${uuid}/`);
const calibration = new RegExp(`^calibrations/${uuid}/`);
const report = new RegExp(`^reports/${uuid}/`);

/** Whether a key is that of an uploaded file. */
export const isSourceKey = (key: string): boolean => source.test(key);

/**
 * Which of `keys` a row refers to, or may refer to once a reading or an analysis under way ends. A key of another form
 * than the product gives counts as referred to: what it did not make it leaves alone.
 */
export async function referredKeys(database: Database, keys: readonly string[]): Promise<Set<string>> {
  const sources = matches(keys, source);
  const readings = matches(keys, reading);
  const computed = matches(keys, analysis);
  const issued = matches(keys, report);
  const certified = matches(keys, calibration);
  const known = new Set(
    [...sources, ...readings, ...computed, ...issued, ...certified].map(({ key }) => key),
  );
  const [sourceRows, readRows, sampleRows, analysisRows, arrayRows, reportRows, certificateRows] =
    await Promise.all([
      database
        .select({ key: recordings.sourceKey })
        .from(recordings)
        .where(
          and(
            inArray(recordings.projectId, ids(sources, 0)),
            inArray(recordings.fileSha256, ids(sources, 1)),
          ),
        ),
      database
        .select({ id: recordings.id })
        .from(recordings)
        .where(
          and(inArray(recordings.id, ids(readings, 0)), inArray(recordings.status, ['received', 'reading'])),
        ),
      database
        .select({ samples: channels.samplesKey, pyramid: channels.pyramidKey })
        .from(channels)
        .where(inArray(channels.recordingId, ids(readings, 0))),
      database
        .select({ id: analyses.id })
        .from(analyses)
        .where(and(inArray(analyses.id, ids(computed, 1)), inArray(analyses.status, ['queued', 'running']))),
      database
        .select({ spectrum: analysisChannels.spectrumKey, series: analysisChannels.seriesKey })
        .from(analysisChannels)
        .where(inArray(analysisChannels.analysisId, ids(computed, 1))),
      database
        .select({ pdf: reports.pdfKey, json: reports.jsonKey, csv: reports.csvKey })
        .from(reports)
        .where(inArray(reports.id, ids(issued, 0))),
      database
        .select({ key: calibrations.certificateKey })
        .from(calibrations)
        .where(inArray(calibrations.id, ids(certified, 0))),
    ]);
  const beingRead = new Set(readRows.map(({ id }) => id));
  const beingComputed = new Set(analysisRows.map(({ id }) => id));
  return new Set([
    ...keys.filter((key) => !known.has(key)),
    ...sourceRows.map(({ key }) => key),
    ...sampleRows.flatMap(({ samples, pyramid }) => [samples, pyramid]),
    ...arrayRows.flatMap(({ spectrum, series }) => (series === null ? [spectrum] : [spectrum, series])),
    ...reportRows.flatMap(({ pdf, json, csv }) => [pdf, json, csv].filter((key) => key !== null)),
    ...certificateRows.flatMap(({ key }) => key ?? []),
    ...readings.filter(({ parts }) => beingRead.has(parts[0]!)).map(({ key }) => key),
    ...computed.filter(({ parts }) => beingComputed.has(parts[1]!)).map(({ key }) => key),
  ]);
}

interface Match {
  key: string;
  /** What the groups of the pattern took. */
  parts: string[];
}

function matches(keys: readonly string[], pattern: RegExp): Match[] {
  return keys.flatMap((key) => {
    const match = pattern.exec(key);
    return match === null ? [] : [{ key, parts: match.slice(1) }];
  });
}

function ids(found: Match[], part: number): string[] {
  return [...new Set(found.map(({ parts }) => parts[part]!))];
}
