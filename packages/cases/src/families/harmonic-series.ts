import { analyseOneChannel, commonSettings, nominalOf } from '../analyse-case.js';
import type { Mapper } from '../quantities.js';
import { waveQuantities } from './wave-quantities.js';

/** Family 2: rms and phase of every order, by least squares over the whole record. */
export const harmonicSeries: Mapper = async (folder, one) => {
  const channel = await analyseOneChannel(folder, one, {
    profile: 'general',
    nominalFrequencyHz: nominalOf(one),
    maxOrder: commonSettings.parse(one.analysis).orders,
  });
  return waveQuantities(channel);
};
