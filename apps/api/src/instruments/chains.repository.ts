import { Inject, Injectable } from '@nestjs/common';
import type { ChainQuery } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import {
  and,
  asc,
  eq,
  getTableColumns,
  ilike,
  inArray,
  isNotNull,
  isNull,
  or,
  sql,
  type SQL,
} from 'drizzle-orm';
import { z } from 'zod';
import { decodeCursor, likePattern } from '../common/paging.js';
import { DATABASE } from '../database/database.tokens.js';
import type { InstrumentRow } from './instruments.repository.js';

const { channels, instruments, measuringChainInstruments, measuringChains, recordings } = schema;

export type ChainRow = typeof measuringChains.$inferSelect;
export type ChainRecord = ChainRow & { recordingCount: number };

/** Rows of measuring chains and which instruments stand in them. */
@Injectable()
export class ChainsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** Those behind the cursor by name, at most `limit + 1`. */
  list({ q, retired, cursor, limit }: ChainQuery): Promise<ChainRecord[]> {
    const place = decodeCursor(cursor, z.tuple([z.string(), z.uuid()]));
    const pattern = q ? likePattern(q) : undefined;
    const { name, description, retiredAt, id } = measuringChains;
    return this.records(
      and(
        pattern === undefined ? undefined : or(ilike(name, pattern), ilike(description, pattern)),
        retired === undefined ? undefined : retired === 'true' ? isNotNull(retiredAt) : isNull(retiredAt),
        place && sql`(${name}, ${id}) > (${place[0]}::text, ${place[1]}::uuid)`,
      ),
    )
      .orderBy(asc(name), asc(id))
      .limit(limit + 1);
  }

  async record(id: string): Promise<ChainRecord | undefined> {
    const [row] = await this.records(eq(measuringChains.id, id));
    return row;
  }

  find(ids: readonly string[]): Promise<ChainRow[]> {
    return this.database
      .select()
      .from(measuringChains)
      .where(inArray(measuringChains.id, [...ids]));
  }

  /** Instruments of several chains, each chain's in their order. */
  instrumentsOf(chainIds: readonly string[]): Promise<(InstrumentRow & { chainId: string })[]> {
    return this.database
      .select({ ...getTableColumns(instruments), chainId: measuringChainInstruments.chainId })
      .from(measuringChainInstruments)
      .innerJoin(instruments, eq(instruments.id, measuringChainInstruments.instrumentId))
      .where(inArray(measuringChainInstruments.chainId, [...chainIds]))
      .orderBy(measuringChainInstruments.position);
  }

  async lock(tx: Tx, id: string): Promise<ChainRow | undefined> {
    const [row] = await tx.select().from(measuringChains).where(eq(measuringChains.id, id)).for('update');
    return row;
  }

  async instrumentIds(tx: Tx, chainId: string): Promise<string[]> {
    const rows = await tx
      .select({ id: measuringChainInstruments.instrumentId })
      .from(measuringChainInstruments)
      .where(eq(measuringChainInstruments.chainId, chainId))
      .orderBy(measuringChainInstruments.position);
    return rows.map(({ id }) => id);
  }

  /** How many recordings and channels name a chain. */
  async useOf(tx: Tx, chainId: string): Promise<number> {
    const [ofRecordings, ofChannels] = [
      await tx.$count(recordings, eq(recordings.measuringChainId, chainId)),
      await tx.$count(channels, eq(channels.measuringChainId, chainId)),
    ];
    return ofRecordings + ofChannels;
  }

  instrumentsByIds(tx: Tx, ids: readonly string[]): Promise<InstrumentRow[]> {
    return tx
      .select()
      .from(instruments)
      .where(inArray(instruments.id, [...ids]));
  }

  async insert(tx: Tx, row: typeof measuringChains.$inferInsert): Promise<string> {
    const [created] = await tx.insert(measuringChains).values(row).returning({ id: measuringChains.id });
    return created!.id;
  }

  async update(tx: Tx, id: string, change: Partial<ChainRow>): Promise<void> {
    await tx
      .update(measuringChains)
      .set({ ...change, updatedAt: new Date() })
      .where(eq(measuringChains.id, id));
  }

  async setInstruments(tx: Tx, chainId: string, instrumentIds: readonly string[]): Promise<void> {
    await tx.delete(measuringChainInstruments).where(eq(measuringChainInstruments.chainId, chainId));
    const rows = instrumentIds.map((instrumentId, position) => ({ chainId, position, instrumentId }));
    await tx.insert(measuringChainInstruments).values(rows);
  }

  async delete(tx: Tx, id: string): Promise<void> {
    await tx.delete(measuringChains).where(eq(measuringChains.id, id));
  }

  private records(where: SQL | undefined) {
    const chainId = measuringChains.id;
    const ofChannel = this.database
      .select({ id: channels.recordingId })
      .from(channels)
      .where(and(eq(channels.recordingId, recordings.id), eq(channels.measuringChainId, chainId)));
    const used = this.database.$count(
      recordings,
      or(eq(recordings.measuringChainId, chainId), sql`exists ${ofChannel}`),
    );
    return this.database
      .select({ ...getTableColumns(measuringChains), recordingCount: used })
      .from(measuringChains)
      .where(where)
      .$dynamic();
  }
}
