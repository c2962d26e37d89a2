import { Inject, Injectable } from '@nestjs/common';
import type { EquipmentQuery, ListedMode } from '@overtally/contracts';
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

const { equipment, operatingModes, recordings } = schema;

export type EquipmentRow = typeof equipment.$inferSelect;
export type EquipmentRecord = EquipmentRow & { recordingCount: number };
export type ModeRow = typeof operatingModes.$inferSelect;

/** Rows of equipment under test and its operating modes. */
@Injectable()
export class EquipmentRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** Those behind the cursor by name, at most `limit + 1`. */
  list(projectId: string, { q, retired, cursor, limit }: EquipmentQuery): Promise<EquipmentRecord[]> {
    const place = decodeCursor(cursor, z.tuple([z.string(), z.uuid()]));
    const pattern = q ? likePattern(q) : undefined;
    const words = [equipment.name, equipment.manufacturer, equipment.model, equipment.serialNumber];
    return this.records(
      and(
        eq(equipment.projectId, projectId),
        pattern === undefined ? undefined : or(...words.map((column) => ilike(column, pattern))),
        retired === undefined
          ? undefined
          : retired === 'true'
            ? isNotNull(equipment.retiredAt)
            : isNull(equipment.retiredAt),
        place && sql`(${equipment.name}, ${equipment.id}) > (${place[0]}::text, ${place[1]}::uuid)`,
      ),
    )
      .orderBy(asc(equipment.name), asc(equipment.id))
      .limit(limit + 1);
  }

  async record(id: string): Promise<EquipmentRecord | undefined> {
    const [row] = await this.records(eq(equipment.id, id));
    return row;
  }

  /** Operating modes of several pieces of equipment in their order, with how often they were used. */
  modesOf(equipmentIds: readonly string[]): Promise<(ListedMode & { equipmentId: string })[]> {
    const { id, equipmentId, name, description, retiredAt } = operatingModes;
    const used = this.database.$count(recordings, eq(recordings.operatingModeId, operatingModes.id));
    return this.database
      .select({
        ...{ id, equipmentId, name, description },
        retired: sql<boolean>`${retiredAt} is not null`,
        recordings: used,
      })
      .from(operatingModes)
      .where(inArray(equipmentId, [...equipmentIds]))
      .orderBy(operatingModes.position);
  }

  /** Equipment and mode that a recording names; each null where it names none. */
  async ofRecording(recordingId: string): Promise<{ equipment: EquipmentRow | null; mode: ModeRow | null }> {
    const [row] = await this.database
      .select({ equipment, mode: operatingModes })
      .from(recordings)
      .leftJoin(equipment, eq(equipment.id, recordings.equipmentId))
      .leftJoin(operatingModes, eq(operatingModes.id, recordings.operatingModeId))
      .where(eq(recordings.id, recordingId));
    return row ?? { equipment: null, mode: null };
  }

  /** The equipment, held until the transaction ends; all changes of its modes go through this lock. */
  async lock(tx: Tx, id: string): Promise<EquipmentRow | undefined> {
    const [row] = await tx.select().from(equipment).where(eq(equipment.id, id)).for('update');
    return row;
  }

  /** Equipment of a project; undefined where the project has none such. */
  async find(projectId: string, id: string): Promise<EquipmentRow | undefined> {
    const [row] = await this.database
      .select()
      .from(equipment)
      .where(and(eq(equipment.id, id), eq(equipment.projectId, projectId)));
    return row;
  }

  async mode(id: string): Promise<ModeRow | undefined> {
    const [row] = await this.database.select().from(operatingModes).where(eq(operatingModes.id, id));
    return row;
  }

  async lockedModes(tx: Tx, equipmentId: string): Promise<ModeRow[]> {
    return tx.select().from(operatingModes).where(eq(operatingModes.equipmentId, equipmentId));
  }

  async insert(tx: Tx, row: typeof equipment.$inferInsert): Promise<string> {
    const [created] = await tx.insert(equipment).values(row).returning({ id: equipment.id });
    return created!.id;
  }

  async update(tx: Tx, id: string, change: Partial<EquipmentRow>): Promise<void> {
    await tx
      .update(equipment)
      .set({ ...change, updatedAt: new Date() })
      .where(eq(equipment.id, id));
  }

  async delete(tx: Tx, id: string): Promise<void> {
    await tx.delete(equipment).where(eq(equipment.id, id));
  }

  async insertModes(tx: Tx, rows: (typeof operatingModes.$inferInsert)[]): Promise<void> {
    if (rows.length > 0) await tx.insert(operatingModes).values(rows);
  }

  async updateMode(tx: Tx, id: string, change: Partial<ModeRow>): Promise<void> {
    await tx.update(operatingModes).set(change).where(eq(operatingModes.id, id));
  }

  async deleteMode(tx: Tx, id: string): Promise<void> {
    await tx.delete(operatingModes).where(eq(operatingModes.id, id));
  }

  private records(where: SQL | undefined) {
    const used = this.database.$count(recordings, eq(recordings.equipmentId, equipment.id));
    return this.database
      .select({ ...getTableColumns(equipment), recordingCount: used })
      .from(equipment)
      .where(where)
      .$dynamic();
  }
}
