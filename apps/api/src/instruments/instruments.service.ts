import { Inject, Injectable } from '@nestjs/common';
import {
  calibrationNoticeDays,
  type CreateInstrument,
  type Instrument,
  type InstrumentQuery,
  type UpdateInstrument,
} from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import { retirement } from '../common/retirement.js';
import { DATABASE } from '../database/database.tokens.js';
import { isReferredViolation } from '../database/referred-violation.js';
import { isUniqueViolation } from '../database/unique-violation.js';
import { Storage } from '../storage/storage.js';
import { dayOf, daysLater } from './calibration-at.js';
import { calibrationPrefix } from './calibration-keys.js';
import { toInstrument } from './instrument-view.js';
import { InstrumentsRepository, type InstrumentRecord } from './instruments.repository.js';

/** An instrument whose calibration is due or overdue, and who looks after it; null: nobody, or who has left. */
export interface DueInstrument {
  instrument: { id: string; name: string; manufacturer: string; model: string; serialNumber: string };
  calibration: { id: string; calibratedOn: string; dueOn: string };
  responsible: { id: string; name: string; email: string } | null;
}

/** Transducers, recorders and sources of the laboratory. States of calibration are as of today in UTC. */
@Injectable()
export class InstrumentsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: InstrumentsRepository,
    private readonly storage: Storage,
  ) {}

  async page(query: InstrumentQuery) {
    const today = dayOf(new Date());
    const soon = daysLater(today, calibrationNoticeDays);
    const rows = await this.repository.list(query, { today, soon });
    const page = pageOfRows(
      rows,
      query.limit,
      ({ name, id }) => [name, id],
      (row) => row,
    );
    return { ...page, items: await this.complete(page.items, today) };
  }

  /** @throws 404 */
  async get(id: string): Promise<Instrument> {
    const today = dayOf(new Date());
    const record = await this.repository.record(id, today);
    if (record === undefined) throw noSuchInstrument();
    return (await this.complete([record], today))[0]!;
  }

  /** @throws 409 when there is one of that manufacturer, model and serial number, 422 when nobody is the one responsible */
  async create(createdById: string, input: CreateInstrument): Promise<Instrument> {
    await this.demandPerson(input.responsibleId);
    const id = await unlessKnown(() =>
      this.database.transaction((tx) => this.repository.insert(tx, { ...input, createdById })),
    );
    return this.get(id);
  }

  /** @throws 404, 409 and 422 as `create` */
  async update(id: string, { retired, ...change }: UpdateInstrument): Promise<Instrument> {
    await this.demandPerson(change.responsibleId);
    await unlessKnown(() =>
      this.database.transaction(async (tx) => {
        const before = await this.repository.lock(tx, id);
        if (before === undefined) throw noSuchInstrument();
        await this.repository.update(tx, id, { ...change, ...retirement(retired, before.retiredAt) });
      }),
    );
    return this.get(id);
  }

  /** Deletes an instrument with its calibrations. @throws 404, 409 when a chain or an issued report names it */
  async delete(id: string): Promise<void> {
    const calibrations = await this.repository.calibrationsOf([id]);
    try {
      await this.database.transaction(async (tx) => {
        if ((await this.repository.lock(tx, id)) === undefined) throw noSuchInstrument();
        await this.repository.delete(tx, id);
      });
    } catch (error) {
      if (!isReferredViolation(error)) throw error;
      const chains = (await this.repository.chainNamesOf(id)).map((name) => `“${name}”`).join(', ');
      const who = chains === '' ? 'An issued report names it' : `It stands in ${chains}`;
      const detail = `${who}, so it cannot be deleted; retire it and it is not offered any more`;
      throw problem(409, 'instrument-in-use', detail);
    }
    for (const calibration of calibrations) await this.storage.deleteAll(calibrationPrefix(calibration.id));
  }

  /**
   * Instruments in use whose calibration ends within so many days, or has ended, and of which nobody was told yet. One
   * that was never calibrated has no day to be told of.
   * @param now the moment whose day (UTC) is today
   */
  dueSoon(days: number, now = new Date()): Promise<DueInstrument[]> {
    const today = dayOf(now);
    return this.repository.dueBy(daysLater(today, days), today);
  }

  /** Notes that people were told that these calibrations end, so that they are told once of each. */
  async markDueNoticeSent(tx: Tx, calibrationIds: readonly string[], at = new Date()): Promise<void> {
    if (calibrationIds.length > 0) await this.repository.markDueNoticeSent(tx, calibrationIds, at);
  }

  private async demandPerson(id: string | null | undefined): Promise<void> {
    if (id === null || id === undefined || (await this.repository.isEnabledUser(id))) return;
    const message = 'There is nobody with this account; name somebody who has one, or nobody';
    throw problem(422, 'unknown-person', message, [{ path: 'responsibleId', message }]);
  }

  private async complete(records: InstrumentRecord[], day: string): Promise<Instrument[]> {
    const calibrations = await this.repository.calibrationsOf(records.map(({ id }) => id));
    return records.map((record) =>
      toInstrument(
        record,
        calibrations.filter(({ instrumentId }) => instrumentId === record.id),
        day,
      ),
    );
  }
}

async function unlessKnown<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (!isUniqueViolation(error, 'instruments_model_serial_key')) throw error;
    const message = 'There is an instrument of this manufacturer, model and serial number already';
    throw problem(409, 'instrument-known', message, [{ path: 'serialNumber', message }]);
  }
}

export function noSuchInstrument() {
  return problem(404, 'not-found', 'There is no such instrument');
}
