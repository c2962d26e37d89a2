import type { CreateLimitSet, LimitSet } from '@overtally/contracts';

/**
 * A custom set to create from another one, published or custom: its limits, rows, conditions and procedure, with
 * its name, edition and place in the source. Changes are made to the clone; the original stays as it is.
 */
export function cloneLimitSet(set: LimitSet, title = `Copy of ${set.title}`): CreateLimitSet {
  const place = [set.standard, set.edition, set.tableRef].filter((part) => part !== '').join(', ');
  const { rows, rowChoice, applicability, shortExcursion, statistic } = set;
  return {
    title: title.slice(0, 160),
    standard: set.standard,
    edition: set.edition.slice(0, 80),
    appliesWhen: set.appliesWhen.slice(0, 500),
    quantity: set.quantity,
    unit: set.unit,
    basis: set.basis,
    ...(set.referenceParameter === null ? {} : { referenceParameter: set.referenceParameter }),
    procedure: set.procedure,
    orders: set.orders,
    totals: set.totals,
    ...(rows === undefined ? {} : { rows }),
    ...(rowChoice === undefined ? {} : { rowChoice }),
    ...(applicability === undefined ? {} : { applicability }),
    ...(shortExcursion === undefined ? {} : { shortExcursion }),
    ...(statistic === undefined ? {} : { statistic }),
    source: `Copied from ${set.id}, version ${set.version}${place === '' ? '' : ` (${place})`}`.slice(0, 500),
  };
}
