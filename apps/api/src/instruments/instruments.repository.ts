import { Inject, Injectable } from '@nestjs/common';
import type { InstrumentQuery } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import {
  and,
  asc,
  desc,
  eq,
  getTableColumns,
  ilike,
  inArray,
  isNotNull,
  isNull,
  lt,
  lte,
  or,
  sql,
  type SQL,
} from 'drizzle-orm';
import { z } from 'zod';
import { decodeCursor, likePattern } from '../common/paging.js';
import { DATABASE } from '../database/database.tokens.js';

const { calibrations, instruments, measuringChainInstruments, measuringChains, users } = schema;

export type InstrumentRow = typeof instruments.$inferSelect;
export type InstrumentRecord = InstrumentRow & { responsibleName: string | null };
export type CalibrationRow = typeof calibrations.$inferSelect;

/** Between which days a state of calibration lies. */
export interface StateDays {
  today: string;
  soon: string;
}

/** Rows of instruments and their calibrations. */
@Injectable()
export class InstrumentsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** Those behind the cursor by name, at most `limit + 1`. */
  async list(
    { q, state, retired, cursor, limit }: InstrumentQuery,
    days: StateDays,
  ): Promise<InstrumentRecord[]> {
    const place = decodeCursor(cursor, z.tuple([z.string(), z.uuid()]));
    const pattern = q ? likePattern(q) : undefined;
    const words = [instruments.name, instruments.manufacturer, instruments.model, instruments.serialNumber];
    const counting = this.counting(days.today);
    const rows = await this.records(counting)
      .where(
        and(
          pattern === undefined ? undefined : or(...words.map((column) => ilike(column, pattern))),
          retired === undefined
            ? undefined
            : retired === 'true'
              ? isNotNull(instruments.retiredAt)
              : isNull(instruments.retiredAt),
          state && inState(state, counting.dueOn, days),
          place && sql`(${instruments.name}, ${instruments.id}) > (${place[0]}::text, ${place[1]}::uuid)`,
        ),
      )
      .orderBy(asc(instruments.name), asc(instruments.id))
      .limit(limit + 1);
    return rows;
  }

  async record(id: string, today: string): Promise<InstrumentRecord | undefined> {
    const [row] = await this.records(this.counting(today)).where(eq(instruments.id, id));
    return row;
  }

  /** Calibrations of several instruments. */
  calibrationsOf(instrumentIds: readonly string[]): Promise<CalibrationRow[]> {
    return this.database
      .select()
      .from(calibrations)
      .where(inArray(calibrations.instrumentId, [...instrumentIds]));
  }

  /** Calibrations of an instrument behind the cursor, the newest first, at most `limit + 1`. */
  calibrationPage(
    instrumentId: string,
    cursor: string | undefined,
    limit: number,
  ): Promise<CalibrationRow[]> {
    const place = decodeCursor(cursor, z.tuple([z.iso.date(), z.iso.datetime(), z.uuid()]));
    const { calibratedOn, createdAt, id } = calibrations;
    return this.database
      .select()
      .from(calibrations)
      .where(
        and(
          eq(calibrations.instrumentId, instrumentId),
          place &&
            sql`(${calibratedOn}, ${createdAt}, ${id}) < (${place[0]}::date, ${place[1]}::timestamptz, ${place[2]}::uuid)`,
        ),
      )
      .orderBy(desc(calibratedOn), desc(createdAt), desc(id))
      .limit(limit + 1);
  }

  async calibration(id: string): Promise<CalibrationRow | undefined> {
    const [row] = await this.database.select().from(calibrations).where(eq(calibrations.id, id));
    return row;
  }

  /**
   * Instruments in use whose counting calibration ends by `lastDay` and whose people were not told of it yet, with who is
   * responsible for them.
   */
  dueBy(lastDay: string, today: string) {
    const counting = this.counting(today);
    return this.database
      .select({
        instrument: getTableColumns(instruments),
        calibration: { id: counting.id, calibratedOn: counting.calibratedOn, dueOn: counting.dueOn },
        responsible: { id: users.id, name: users.name, email: users.email },
      })
      .from(instruments)
      .innerJoinLateral(counting, sql`true`)
      .leftJoin(users, and(eq(users.id, instruments.responsibleId), isNull(users.disabledAt)))
      .where(
        and(isNull(instruments.retiredAt), lte(counting.dueOn, lastDay), isNull(counting.dueNoticeSentAt)),
      )
      .orderBy(asc(counting.dueOn), asc(instruments.name));
  }

  async markDueNoticeSent(tx: Tx, calibrationIds: readonly string[], at: Date): Promise<void> {
    await tx
      .update(calibrations)
      .set({ dueNoticeSentAt: at })
      .where(inArray(calibrations.id, [...calibrationIds]));
  }

  async lock(tx: Tx, id: string): Promise<InstrumentRow | undefined> {
    const [row] = await tx.select().from(instruments).where(eq(instruments.id, id)).for('update');
    return row;
  }

  async isEnabledUser(id: string): Promise<boolean> {
    return (await this.database.$count(users, and(eq(users.id, id), isNull(users.disabledAt)))) > 0;
  }

  /** Names of the chains that an instrument stands in. */
  async chainNamesOf(instrumentId: string): Promise<string[]> {
    const rows = await this.database
      .select({ name: measuringChains.name })
      .from(measuringChainInstruments)
      .innerJoin(measuringChains, eq(measuringChains.id, measuringChainInstruments.chainId))
      .where(eq(measuringChainInstruments.instrumentId, instrumentId))
      .orderBy(asc(measuringChains.name));
    return rows.map(({ name }) => name);
  }

  async insert(tx: Tx, row: typeof instruments.$inferInsert): Promise<string> {
    const [created] = await tx.insert(instruments).values(row).returning({ id: instruments.id });
    return created!.id;
  }

  async update(tx: Tx, id: string, change: Partial<InstrumentRow>): Promise<void> {
    await tx
      .update(instruments)
      .set({ ...change, updatedAt: new Date() })
      .where(eq(instruments.id, id));
  }

  async delete(tx: Tx, id: string): Promise<void> {
    await tx.delete(instruments).where(eq(instruments.id, id));
  }

  async insertCalibration(tx: Tx, row: typeof calibrations.$inferInsert): Promise<CalibrationRow> {
    const [created] = await tx.insert(calibrations).values(row).returning();
    return created!;
  }

  async deleteCalibration(tx: Tx, id: string): Promise<void> {
    await tx.delete(calibrations).where(eq(calibrations.id, id));
  }

  /** The calibration of an instrument that counts on a day, to be joined laterally; see `calibrationAt`. */
  private counting(day: string) {
    return this.database
      .select()
      .from(calibrations)
      .where(and(eq(calibrations.instrumentId, instruments.id), lte(calibrations.calibratedOn, day)))
      .orderBy(desc(calibrations.calibratedOn), desc(calibrations.createdAt))
      .limit(1)
      .as('counting');
  }

  private records(counting: ReturnType<InstrumentsRepository['counting']>) {
    return this.database
      .select({ ...getTableColumns(instruments), responsibleName: users.name })
      .from(instruments)
      .leftJoinLateral(counting, sql`true`)
      .leftJoin(users, eq(users.id, instruments.responsibleId))
      .$dynamic();
  }
}

type DueOn = ReturnType<InstrumentsRepository['counting']>['dueOn'];

function inState(
  state: NonNullable<InstrumentQuery['state']>,
  dueOn: DueOn,
  { today, soon }: StateDays,
): SQL | undefined {
  switch (state) {
    case 'none':
      return isNull(dueOn);
    case 'overdue':
      return lt(dueOn, today);
    case 'valid':
      return sql`${dueOn} >= ${today}`;
    case 'due-soon':
      return and(sql`${dueOn} >= ${today}`, lte(dueOn, soon));
  }
}
