import type { ReferenceCase } from './case-file.js';

/** Quantities of a case by their names in the definitions of the cases. */
export type Quantities = Record<string, unknown>;

/** Computes the quantities of a case whose files lie in `folder`. */
export type Mapper = (folder: string, one: ReferenceCase) => Promise<Quantities> | Quantities;

/** The case asks for what the product does not do; it is left out rather than answered by guess. */
export class CannotServe extends Error {
  override readonly name = 'CannotServe';
}
