import type { CreateLimitSet, LimitSet } from '@overtally/contracts';
import { neededParameters, parseLimitTable, readByOwn, readingOf } from '@overtally/limits';
import { problem } from '../common/problem.js';
import type { LimitSetRow } from './limit-sets.repository.js';

type Definition = LimitSetRow['definition'];

/** The set as the contract words it. */
export const toLimitSet = ({
  id,
  projectId,
  familyId,
  version,
  clonedFrom,
  retiredAt,
  newestId,
  definition,
}: LimitSetRow): LimitSet => ({
  ...definition,
  ...{ id, projectId, familyId, version },
  ...(clonedFrom === null ? {} : { clonedFrom }),
  ...(retiredAt === null ? {} : { retiredAt: retiredAt.toISOString() }),
  ...(newestId === id ? {} : { newestId }),
});

/** The limits that were given as a table or as entries. */
function limitsOf({ table, orders, totals }: CreateLimitSet): Pick<LimitSet, 'orders' | 'totals'> {
  if (table === undefined) return { orders, totals };
  const read = parseLimitTable(table);
  if (read.problems === null) return read;
  const errors = read.problems.map(({ line, column, message }) => ({
    path: 'table',
    message: `Line ${line}, column ${column}: ${message}`,
  }));
  throw problem(422, 'limit-table-unreadable', 'The table of limits was not read; see errors', errors);
}

/**
 * What is stored of a custom set: it is compared plainly, order by order, unless it says otherwise, and asks for the
 * parameters that its limits need.
 * @param kept what a copy or a new version keeps of the set it is made from
 * @throws 422 for an absolute limit without a unit, and for a table that cannot be read
 */
export function definitionFrom(
  input: CreateLimitSet,
  author: string,
  kept?: Pick<LimitSet, 'confidence' | 'notes'>,
): Definition {
  if (input.basis === 'absolute' && input.unit === '') {
    const message = 'Give the unit of the limits, such as A or V';
    throw problem(422, 'unit-missing', message, [{ path: 'unit', message }]);
  }
  const { source, procedure = 'plain', table: _table, ...rest } = input;
  const reading = readingOf({ ...input, referenceParameter: input.referenceParameter ?? null });
  const { orders, totals } = readByOwn(limitsOf(input), reading);
  const definition: Definition = {
    ...rest,
    ...reading,
    version: 1,
    tableRef: '',
    procedure,
    parameters: [],
    orders: [...orders].sort((one, other) => one.order - other.order),
    totals,
    source: [source],
    confidence: kept?.confidence ?? 'medium',
    evidence: `Entered in the project by ${author}; to be checked against its source`,
    notes: kept?.notes ?? [],
  };
  return { ...definition, parameters: neededParameters(definition) };
}
