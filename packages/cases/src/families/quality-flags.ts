import { analyse, nominalOf, recordOf } from '../analyse-case.js';
import type { Mapper } from '../quantities.js';

/** Family 10: the flags that reading and analysis raise. */
export const qualityFlags: Mapper = async (folder, one) => {
  const record = await recordOf(folder, one);
  const { channels } = await analyse(record, { profile: 'general', nominalFrequencyHz: nominalOf(one) });
  const raised = channels.flatMap(({ flags }) => flags.map(({ code }) => code));
  return { flags: [...new Set([...record.warnings, ...raised])] };
};
