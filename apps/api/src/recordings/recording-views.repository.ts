import { Inject, Injectable } from '@nestjs/common';
import type { Channel, ChannelSummary, Recording, RecordingQuery } from '@overtally/contracts';
import { schema, type Database } from '@overtally/db';
import { and, asc, desc, eq, getTableColumns, ilike, inArray, isNull, or, sql, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import { ChainsService } from '../instruments/chains.service.js';
import { decodeCursor, likePattern, pageOfRows } from '../common/paging.js';
import { DATABASE } from '../database/database.tokens.js';
import { grouped } from './grouped.js';
import { momentOf, toRecording, type RecordingRecord } from './recording-view.js';

const { analyses, analysisChannels, channels, equipment, harmonics, operatingModes, recordings, users } =
  schema;

/** A channel with the id of its own chain; its chain stands as of the moment of its recording. */
type ChannelPart = Channel & { measuringChainId: string | null };

const equipmentColumns = {
  id: equipment.id,
  name: equipment.name,
  manufacturer: equipment.manufacturer,
  model: equipment.model,
  serialNumber: equipment.serialNumber,
  ratings: equipment.ratings,
  retiredAt: equipment.retiredAt,
};
const modeColumns = {
  id: operatingModes.id,
  name: operatingModes.name,
  description: operatingModes.description,
  retiredAt: operatingModes.retiredAt,
};

const sortColumns = { number: recordings.number, name: recordings.name, createdAt: recordings.createdAt };
type SortKey = keyof typeof sortColumns;

/** What a cursor holds under each order: the value sorted by, and the id that tells equal ones apart. */
const cursorShapes = {
  number: z.tuple([z.int32(), z.uuid()]),
  name: z.tuple([z.string().refine((name) => !name.includes('\0')), z.uuid()]),
  createdAt: z.tuple([z.iso.datetime(), z.uuid()]),
};

/** Recordings as the outside sees them, a whole page in few queries. */
@Injectable()
export class RecordingViewsRepository {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly chains: ChainsService,
  ) {}

  async one(id: string): Promise<Recording | undefined> {
    const records = await this.records(eq(recordings.id, id));
    return (await this.complete(records))[0];
  }

  async page(projectId: string, query: RecordingQuery) {
    const descending = query.sort.startsWith('-');
    const key = query.sort.replace('-', '') as SortKey;
    const direction = descending ? desc : asc;
    const records = await this.records(
      and(eq(recordings.projectId, projectId), ...matches(query), after(query.cursor, key, descending)),
      [direction(sortColumns[key]), direction(recordings.id)],
      query.limit + 1,
    );
    const page = pageOfRows(
      records,
      query.limit,
      (row) => [cursorValue(row, key), row.id],
      (row) => row,
    );
    return { ...page, items: await this.complete(page.items) };
  }

  private async records(where: SQL | undefined, order: SQL[] = [], limit = 1): Promise<RecordingRecord[]> {
    const earlier = sql<RecordingRecord['duplicateOf']>`(
      select json_build_object('id', earlier.id, 'number', earlier.number)
      from recordings earlier
      where earlier.project_id = ${recordings.projectId} and earlier.file_sha256 = ${recordings.fileSha256}
        and earlier.number < ${recordings.number}
      order by earlier.number limit 1)`;
    return this.database
      .select({
        ...getTableColumns(recordings),
        duplicateOf: earlier,
        uploaderName: users.name,
        equipment: equipmentColumns,
        operatingMode: modeColumns,
      })
      .from(recordings)
      .innerJoin(users, eq(users.id, recordings.uploadedById))
      .leftJoin(equipment, eq(equipment.id, recordings.equipmentId))
      .leftJoin(operatingModes, eq(operatingModes.id, recordings.operatingModeId))
      .where(where)
      .orderBy(...order)
      .limit(limit);
  }

  private async complete(records: RecordingRecord[]): Promise<Recording[]> {
    if (records.length === 0) return [];
    const ids = records.map(({ id }) => id);
    const [channelsById, latestById] = await Promise.all([this.channelsOf(ids), this.latestAnalyses(ids)]);
    const summaries = await this.summariesOf([...latestById.values()]);
    const parts = [...records, ...[...channelsById.values()].flat()];
    const chainAt = await this.chains.refs(parts.flatMap(({ measuringChainId }) => measuringChainId ?? []));
    return records.map((record) => {
      const latestAnalysisId = latestById.get(record.id) ?? null;
      const moment = momentOf(record);
      return toRecording(record, {
        chain: chainAt(record.measuringChainId, moment),
        channels: (channelsById.get(record.id) ?? []).map(({ measuringChainId, ...channel }) => ({
          ...channel,
          chain: chainAt(measuringChainId, moment),
        })),
        latestAnalysisId,
        summaries: summaries.get(latestAnalysisId ?? '') ?? [],
      });
    });
  }

  private async channelsOf(ids: string[]): Promise<Map<string, ChannelPart[]>> {
    const { recordingId, index, name, quantity, unit, gain, offset, measuringChainId } = channels;
    const rows = await this.database
      .select({ recordingId, index, name, quantity, unit, gain, offset, measuringChainId })
      .from(channels)
      .where(inArray(channels.recordingId, ids))
      .orderBy(channels.index);
    return grouped(rows, (row) => row.recordingId);
  }

  private async latestAnalyses(ids: string[]): Promise<Map<string, string>> {
    const rows = await this.database
      .selectDistinctOn([analyses.recordingId], { recordingId: analyses.recordingId, id: analyses.id })
      .from(analyses)
      .where(
        and(inArray(analyses.recordingId, ids), eq(analyses.status, 'done'), isNull(analyses.supersededById)),
      )
      .orderBy(analyses.recordingId, desc(analyses.createdAt), desc(analyses.id));
    return new Map(rows.map((row) => [row.recordingId, row.id]));
  }

  private async summariesOf(analysisIds: string[]): Promise<Map<string, ChannelSummary[]>> {
    if (analysisIds.length === 0) return new Map();
    const orders = this.database
      .select({
        analysisId: harmonics.analysisId,
        channelIndex: harmonics.channelIndex,
        rms: sql<number[]>`array_agg(${harmonics.rms} order by ${harmonics.order})`.as('rms_by_order'),
      })
      .from(harmonics)
      .where(inArray(harmonics.analysisId, analysisIds))
      .groupBy(harmonics.analysisId, harmonics.channelIndex)
      .as('orders');
    const { analysisId, index, name, quantity, unit, rms, fundamental, thdFPercent } = analysisChannels;
    const rows = await this.database
      .select({
        ...{ analysisId, index, name, quantity, unit, rms, fundamental, thdFPercent },
        harmonicRms: sql<number[]>`coalesce(${orders.rms}, '{}')`,
      })
      .from(analysisChannels)
      .leftJoin(orders, and(eq(orders.analysisId, analysisId), eq(orders.channelIndex, index)))
      .where(inArray(analysisId, analysisIds))
      .orderBy(index);
    const summaries = rows.flatMap((row) =>
      row.rms === null
        ? []
        : [
            {
              ...row,
              rms: row.rms,
              channel: row.index,
              fundamentalHz: row.fundamental?.frequencyHz ?? null,
            },
          ],
    );
    return grouped(summaries, (row) => row.analysisId);
  }
}

function matches({ q, status, equipmentId }: RecordingQuery): SQL[] {
  const conditions: SQL[] = [];
  if (status !== undefined) conditions.push(eq(recordings.status, status));
  if (equipmentId !== undefined) conditions.push(eq(recordings.equipmentId, equipmentId));
  if (q !== undefined && q !== '') {
    const pattern = likePattern(q);
    const written = sql`'R-' || lpad(${recordings.number}::text, greatest(4, length(${recordings.number}::text)), '0')`;
    conditions.push(
      or(
        ilike(written, pattern),
        ilike(recordings.name, pattern),
        ilike(recordings.eut, pattern),
        ilike(equipment.name, pattern),
        ilike(recordings.fileName, pattern),
      )!,
    );
  }
  return conditions;
}

/** Rows behind the cursor, in the order of sorting (keyset paging). */
function after(cursor: string | undefined, key: SortKey, descending: boolean): SQL | undefined {
  const place = decodeCursor<z.ZodType<[string | number, string]>>(cursor, cursorShapes[key]);
  if (place === undefined) return undefined;
  const [value, id] = place;
  const column = sortColumns[key];
  const typed = {
    number: sql`${value}::integer`,
    name: sql`${value}::text`,
    createdAt: sql`${value}::timestamptz`,
  };
  return descending
    ? sql`(${column}, ${recordings.id}) < (${typed[key]}, ${id}::uuid)`
    : sql`(${column}, ${recordings.id}) > (${typed[key]}, ${id}::uuid)`;
}

function cursorValue(row: RecordingRecord, key: SortKey): string | number {
  return key === 'createdAt' ? row.createdAt.toISOString() : row[key];
}
