import { Inject, Injectable } from '@nestjs/common';
import type {
  ChainQuery,
  ChainRef,
  MeasuringChain,
  MeasuringChainListItem,
  UpdateChain,
  WriteChain,
} from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { pageOfRows } from '../common/paging.js';
import { problem, type FieldError } from '../common/problem.js';
import { retirement } from '../common/retirement.js';
import { DATABASE } from '../database/database.tokens.js';
import { isKeptByReport, isReferredViolation } from '../database/referred-violation.js';
import { isUniqueViolation } from '../database/unique-violation.js';
import { dayOf, worstState } from './calibration-at.js';
import { ChainsRepository, type ChainRecord, type ChainRow } from './chains.repository.js';
import { toInstrumentRef } from './instrument-view.js';
import { InstrumentsRepository, type CalibrationRow, type InstrumentRow } from './instruments.repository.js';

/** Chains with all that tells how they stood on any day. */
type ChainParts = ChainRow & { instruments: (InstrumentRow & { calibrations: CalibrationRow[] })[] };

/** Measuring chains of the laboratory: which instruments stand between a quantity and its samples. */
@Injectable()
export class ChainsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: ChainsRepository,
    private readonly instruments: InstrumentsRepository,
  ) {}

  async page(query: ChainQuery) {
    const rows = await this.repository.list(query);
    const page = pageOfRows(
      rows,
      query.limit,
      ({ name, id }) => [name, id],
      (row) => row,
    );
    return { ...page, items: await this.listed(page.items) };
  }

  /** As of today. @throws 404 */
  async get(id: string): Promise<MeasuringChainListItem> {
    const record = await this.repository.record(id);
    if (record === undefined) throw noSuchChain();
    return (await this.listed([record]))[0]!;
  }

  /**
   * A chain as it stood at a moment: each instrument with the calibration that counted on that day (UTC).
   * @throws 404
   */
  async chainAt(chainId: string, moment: Date): Promise<MeasuringChain> {
    const [chain] = await this.parts(await this.repository.find([chainId]));
    if (chain === undefined) throw noSuchChain();
    return toChain(chain, dayOf(moment));
  }

  /** Chains as recordings name them, by id: a function of the moment at which a recording was captured. */
  async refs(ids: readonly string[]): Promise<(id: string | null, moment: Date) => ChainRef | null> {
    const unique = [...new Set(ids)];
    const chains = unique.length === 0 ? [] : await this.parts(await this.repository.find(unique));
    const byId = new Map(chains.map((chain) => [chain.id, chain]));
    return (id, moment) => {
      const chain = id === null ? undefined : byId.get(id);
      if (chain === undefined) return null;
      const { name, calibrationState } = toChain(chain, dayOf(moment));
      return { id: chain.id, name, calibrationState, retiredAt: chain.retiredAt?.toISOString() ?? null };
    };
  }

  /**
   * Refuses chains that a recording may not name.
   * @param named by the path of the field that names them
   * @throws 422 for one that is not there, or retired
   */
  async demandInUse(named: readonly { path: string; id: string }[]): Promise<void> {
    if (named.length === 0) return;
    const rows = await this.repository.find(named.map(({ id }) => id));
    const errors = named.flatMap(({ path, id }): FieldError[] => {
      const found = rows.find((row) => row.id === id);
      if (found === undefined) return [{ path, message: 'There is no such measuring chain' }];
      if (found.retiredAt === null) return [];
      return [{ path, message: `${found.name} is retired; take it back into use first` }];
    });
    if (errors.length > 0) throw problem(422, 'unfit-reference', errors[0]!.message, errors);
  }

  /** @throws 409 for a name that is taken, 422 for an instrument that is not known or retired */
  async create(
    createdById: string,
    { instrumentIds, ...input }: WriteChain,
  ): Promise<MeasuringChainListItem> {
    const id = await unlessNameTaken(input.name, () =>
      this.database.transaction(async (tx) => {
        await this.demandInstruments(tx, instrumentIds, []);
        const made = await this.repository.insert(tx, { ...input, createdById });
        await this.repository.setInstruments(tx, made, instrumentIds);
        return made;
      }),
    );
    return this.get(id);
  }

  /**
   * Changes a chain. Once recordings name it its instruments stay, or what they were measured by would change after the
   * fact.
   * @throws 404, 409 for a name that is taken and for other instruments of a chain in use, 422 as `create`
   */
  async update(
    id: string,
    { instrumentIds, retired, ...change }: UpdateChain,
  ): Promise<MeasuringChainListItem> {
    await unlessNameTaken(change.name, () =>
      this.database.transaction(async (tx) => {
        const before = await this.repository.lock(tx, id);
        if (before === undefined) throw noSuchChain();
        await this.repository.update(tx, id, { ...change, ...retirement(retired, before.retiredAt) });
        if (instrumentIds !== undefined) await this.changeInstruments(tx, id, instrumentIds);
      }),
    );
    return this.get(id);
  }

  /** @throws 404, 409 when a recording or an issued report names it */
  async delete(id: string): Promise<void> {
    try {
      await this.database.transaction(async (tx) => {
        if ((await this.repository.lock(tx, id)) === undefined) throw noSuchChain();
        await this.repository.delete(tx, id);
      });
    } catch (error) {
      if (!isReferredViolation(error)) throw error;
      const who = isKeptByReport(error) ? 'An issued report names' : 'Recordings name';
      const detail = `${who} this chain, so it cannot be deleted; retire it and it is not offered any more`;
      throw problem(409, 'chain-in-use', detail);
    }
  }

  private async changeInstruments(tx: Tx, id: string, wanted: readonly string[]): Promise<void> {
    const before = await this.repository.instrumentIds(tx, id);
    if (before.length === wanted.length && before.every((each, i) => each === wanted[i])) return;
    if ((await this.repository.useOf(tx, id)) > 0) {
      const message =
        'Recordings were made through this chain, so its instruments stay; make a new chain and retire this one';
      throw problem(409, 'chain-in-use', message, [{ path: 'instrumentIds', message }]);
    }
    await this.demandInstruments(tx, wanted, before);
    await this.repository.setInstruments(tx, id, wanted);
  }

  private async demandInstruments(tx: Tx, ids: readonly string[], before: readonly string[]): Promise<void> {
    const rows = await this.repository.instrumentsByIds(tx, ids);
    const errors = ids.flatMap((id, place): FieldError[] => {
      const found = rows.find((row) => row.id === id);
      const path = `instrumentIds.${place}`;
      if (found === undefined) return [{ path, message: 'There is no such instrument' }];
      if (found.retiredAt === null || before.includes(id)) return [];
      return [{ path, message: `${found.name} is retired; take it back into use first` }];
    });
    if (errors.length > 0) {
      throw problem(422, 'unfit-reference', `${errors[0]!.message}; choose another one`, errors);
    }
  }

  private async listed(records: ChainRecord[]): Promise<MeasuringChainListItem[]> {
    const today = dayOf(new Date());
    const chains = await this.parts(records);
    return chains.map((chain, i) => ({
      ...toChain(chain, today),
      recordings: records[i]!.recordingCount,
      retiredAt: chain.retiredAt?.toISOString() ?? null,
      createdAt: chain.createdAt.toISOString(),
    }));
  }

  private async parts(chains: readonly ChainRow[]): Promise<ChainParts[]> {
    const rows = await this.repository.instrumentsOf(chains.map(({ id }) => id));
    const calibrations = await this.instruments.calibrationsOf([...new Set(rows.map(({ id }) => id))]);
    return chains.map((chain) => ({
      ...chain,
      instruments: rows
        .filter(({ chainId }) => chainId === chain.id)
        .map((row) => ({
          ...row,
          calibrations: calibrations.filter(({ instrumentId }) => instrumentId === row.id),
        })),
    }));
  }
}

function toChain({ id, name, description, instruments }: ChainParts, day: string): MeasuringChain {
  const refs = instruments.map((each) => toInstrumentRef(each, each.calibrations, day));
  const calibrationState = worstState(refs.map((ref) => ref.calibrationState));
  return { id, name, description, instruments: refs, calibrationState };
}

async function unlessNameTaken<T>(name: string | undefined, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (!isUniqueViolation(error, 'measuring_chains_name_key')) throw error;
    const message = `There is a measuring chain named “${name}” already; choose another name`;
    throw problem(409, 'name-taken', message, [{ path: 'name', message }]);
  }
}

function noSuchChain() {
  return problem(404, 'not-found', 'There is no such measuring chain');
}
