import type { ImportOptions } from '@overtally/contracts';
import { fittingRule, type ColumnsUnder, type RankedRule } from './fitting-rule.js';

/** What a request says of how a file is to be read; see `readingRuleIdSchema`. */
export interface StatedReading {
  import?: ImportOptions | undefined;
  readingRuleId?: string | null | undefined;
}

/** How a file is to be read, and by which rule. */
export interface ChosenReading {
  options: ImportOptions;
  readingRule: { id: string; name: string } | null;
}

/** True when a request states options; an empty object states none. */
export function statesOptions({ import: options }: StatedReading): boolean {
  return options !== undefined && Object.keys(options).length > 0;
}

/**
 * Chooses by what a request states, else by the rules.
 * @param rules those that come into question: none where options are stated and no rule is named, one where it is
 */
export async function chooseOptions(
  stated: StatedReading,
  rules: readonly (RankedRule & { name: string; options: ImportOptions })[],
  fileName: string,
  columnsUnder: ColumnsUnder,
): Promise<ChosenReading> {
  const rule =
    stated.readingRuleId === undefined ? await fittingRule(rules, fileName, columnsUnder) : rules[0];
  const options = statesOptions(stated) ? stated.import : rule?.options;
  return {
    options: options ?? {},
    readingRule: rule === undefined ? null : { id: rule.id, name: rule.name },
  };
}
