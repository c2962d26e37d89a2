/**
 * What is measured. The reference does less than the engine: no quality flags, no uncertainties, no second look for the
 * frequency.
 *
 * @typedef {object} BenchCase
 * @property {string} name
 * @property {string} kind of the reference
 * @property {string} file
 * @property {number} sampleRateHz
 * @property {object} settings of the analysis
 * @property {number[]} threads
 */

const mains = { file: 'mains30m.npy', sampleRateHz: 50_000 };

/** @type {BenchCase[]} */
export const benchCases = [
  {
    ...mains,
    name: 'mains 30M',
    kind: 'mains',
    settings: { profile: 'mains', nominalFrequencyHz: 50 },
    threads: [1, 2],
  },
  {
    ...mains,
    name: 'general 30M',
    kind: 'general',
    settings: {
      profile: 'general',
      nominalFrequencyHz: 'auto',
      window: 'hann',
      segmentLength: 16_384,
      overlapPercent: 50,
    },
    threads: [1, 2],
  },
  {
    name: 'tone 1M',
    kind: 'tone',
    file: 'tone1m.npy',
    sampleRateHz: 192_000,
    settings: { profile: 'tone', nominalFrequencyHz: 'auto' },
    threads: [1],
  },
];
