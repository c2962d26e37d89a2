import { Inject, Injectable } from '@nestjs/common';
import {
  equipmentLine,
  type CreateEquipment,
  type Equipment,
  type EquipmentQuery,
  type ListedMode,
  type ReportSection,
  type UpdateEquipment,
} from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import { retirement } from '../common/retirement.js';
import { DATABASE } from '../database/database.tokens.js';
import { isKeptByReport, isReferredViolation } from '../database/referred-violation.js';
import { EquipmentRepository, type EquipmentRecord, type EquipmentRow } from './equipment.repository.js';

type ModesToWrite = CreateEquipment['operatingModes'];

/** What a change says of the equipment of a recording; undefined: nothing. */
export interface NamedEquipment {
  equipmentId?: string | null | undefined;
  operatingModeId?: string | null | undefined;
}

/** Equipment under test with its ratings and operating modes. */
@Injectable()
export class EquipmentService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: EquipmentRepository,
  ) {}

  async page(projectId: string, query: EquipmentQuery) {
    const rows = await this.repository.list(projectId, query);
    const page = pageOfRows(
      rows,
      query.limit,
      ({ name, id }) => [name, id],
      (row) => row,
    );
    return { ...page, items: await this.complete(page.items) };
  }

  /** @throws 404 */
  async get(id: string): Promise<Equipment> {
    const record = await this.repository.record(id);
    if (record === undefined) throw noSuchEquipment();
    return (await this.complete([record]))[0]!;
  }

  async create(
    projectId: string,
    createdById: string,
    { operatingModes, ...input }: CreateEquipment,
  ): Promise<Equipment> {
    const id = await this.database.transaction(async (tx) => {
      const made = await this.repository.insert(tx, { ...input, projectId, createdById });
      await this.writeModes(tx, made, operatingModes);
      return made;
    });
    return this.get(id);
  }

  /**
   * @throws 409 when a mode that is left out is used by a recording or an issued report, 422 for a mode of other equipment
   */
  async update(id: string, { operatingModes, retired, ...change }: UpdateEquipment): Promise<Equipment> {
    await this.database.transaction(async (tx) => {
      const before = await this.repository.lock(tx, id);
      if (before === undefined) throw noSuchEquipment();
      await this.repository.update(tx, id, { ...change, ...retirement(retired, before.retiredAt) });
      if (operatingModes !== undefined) await this.writeModes(tx, id, operatingModes);
    });
    return this.get(id);
  }

  /** @throws 409 when a recording or an issued report names it */
  async delete(id: string): Promise<void> {
    try {
      await this.database.transaction((tx) => this.repository.delete(tx, id));
    } catch (error) {
      if (!isReferredViolation(error)) throw error;
      const who = isKeptByReport(error) ? 'An issued report names' : 'Recordings name';
      throw problem(
        409,
        'equipment-in-use',
        `${who} this equipment, so it cannot be deleted; retire it and it is not offered any more`,
      );
    }
  }

  /** What a report says of the equipment of a recording; null where it names none. */
  async ofRecording(recordingId: string): Promise<Pick<ReportSection, 'equipment' | 'operatingMode'>> {
    const { equipment, mode } = await this.repository.ofRecording(recordingId);
    if (equipment === null) return { equipment: null, operatingMode: null };
    const { id, name, manufacturer, model, serialNumber, ratings, receivedOn, remark } = equipment;
    return {
      equipment: { id, name, manufacturer, model, serialNumber, ratings, receivedOn, remark },
      operatingMode: mode && { id: mode.id, name: mode.name, description: mode.description },
    };
  }

  /**
   * Columns of a recording by what is said of its equipment, checked against the project.
   * @param before what the recording names so far
   * @returns `eut` too, the line of the equipment, when other equipment is named
   * @throws 422 for equipment of another project, a mode of other equipment, and retired ones that were not named before
   */
  async named(
    projectId: string,
    { equipmentId, operatingModeId }: NamedEquipment,
    before: { equipmentId: string | null; operatingModeId: string | null },
  ): Promise<{ equipmentId?: string | null; operatingModeId?: string | null; eut?: string }> {
    const changed = equipmentId !== undefined && equipmentId !== before.equipmentId;
    const wanted = equipmentId === undefined ? before.equipmentId : equipmentId;
    const found = changed && wanted !== null ? await this.demand(projectId, wanted) : undefined;
    const named = found && { eut: equipmentLine(found) };
    const equipmentPart = changed ? { equipmentId: wanted, ...named } : {};
    if (operatingModeId === undefined) {
      return changed ? { ...equipmentPart, operatingModeId: null } : {};
    }
    const modeChanged = changed || operatingModeId !== before.operatingModeId;
    if (operatingModeId !== null && modeChanged) await this.demandMode(wanted, operatingModeId);
    return { ...equipmentPart, operatingModeId };
  }

  private async demand(projectId: string, id: string): Promise<EquipmentRow> {
    const found = await this.repository.find(projectId, id);
    if (found === undefined) {
      throw unfit('equipmentId', 'The project has no such equipment; name one of its own');
    }
    if (found.retiredAt !== null) {
      throw unfit('equipmentId', `${found.name} is retired; take it back into use first`);
    }
    return found;
  }

  private async demandMode(equipmentId: string | null, id: string): Promise<void> {
    const mode = await this.repository.mode(id);
    if (mode === undefined || equipmentId === null || mode.equipmentId !== equipmentId) {
      throw unfit('operatingModeId', 'This is no operating mode of the equipment; name one of its own');
    }
    if (mode.retiredAt !== null) {
      throw unfit('operatingModeId', `${mode.name} is retired; take it back into use first`);
    }
  }

  private async writeModes(tx: Tx, equipmentId: string, modes: ModesToWrite): Promise<void> {
    const before = await this.repository.lockedModes(tx, equipmentId);
    const known = new Map(before.map((mode) => [mode.id, mode]));
    const strangers = modes.flatMap(({ id }, place) =>
      id === undefined || known.has(id)
        ? []
        : [{ path: `operatingModes.${place}.id`, message: 'This is no operating mode of the equipment' }],
    );
    if (strangers.length > 0) {
      throw problem(
        422,
        'not-of-equipment',
        'An operating mode is not of this equipment; see errors',
        strangers,
      );
    }
    const kept = new Set(modes.flatMap(({ id }) => id ?? []));
    for (const mode of before) {
      if (!kept.has(mode.id)) await this.deleteMode(tx, mode);
      // Names that change places must not meet on the way.
      else await this.repository.updateMode(tx, mode.id, { name: `\u0001${mode.id}` });
    }
    for (const [position, { id, retired, ...mode }] of modes.entries()) {
      const earlier = id === undefined ? undefined : known.get(id);
      const row = { ...mode, position, ...retirement(retired, earlier?.retiredAt ?? null) };
      if (earlier === undefined) await this.repository.insertModes(tx, [{ ...row, equipmentId }]);
      else await this.repository.updateMode(tx, earlier.id, row);
    }
  }

  private async deleteMode(tx: Tx, { id, name }: { id: string; name: string }): Promise<void> {
    try {
      // A savepoint, so that the refusal can be told in words of ours.
      await tx.transaction((inner) => this.repository.deleteMode(inner, id));
    } catch (error) {
      if (!isReferredViolation(error)) throw error;
      const who = isKeptByReport(error) ? 'An issued report names' : 'Recordings name';
      const message = `${who} the operating mode “${name}”; retire it instead of leaving it out`;
      throw problem(409, 'mode-in-use', message, [{ path: 'operatingModes', message }]);
    }
  }

  private async complete(records: EquipmentRecord[]): Promise<Equipment[]> {
    const modes = await this.repository.modesOf(records.map(({ id }) => id));
    return records.map((record) =>
      toEquipment(
        record,
        modes.filter(({ equipmentId }) => equipmentId === record.id),
      ),
    );
  }
}

function toEquipment(record: EquipmentRecord, modes: ListedMode[]): Equipment {
  const { id, projectId, name, manufacturer, model, serialNumber, ratings, receivedOn, remark } = record;
  return {
    ...{ id, projectId, name, manufacturer, model, serialNumber, ratings, receivedOn, remark },
    operatingModes: modes.map(({ id, name, description, recordings, retired }) => ({
      ...{ id, name, description, recordings, retired },
    })),
    recordings: record.recordingCount,
    retiredAt: record.retiredAt?.toISOString() ?? null,
    createdAt: record.createdAt.toISOString(),
  };
}

function unfit(path: string, message: string) {
  return problem(422, 'unfit-reference', message, [{ path, message }]);
}

function noSuchEquipment() {
  return problem(404, 'not-found', 'There is no such equipment');
}
