/**
 * What is measured. The reference does less than the engine: no quality flags, no uncertainties, no second look for the
 * frequency, no power of voltage and current; it takes the layout of a table as given and checks no time stamp.
 *
 * @typedef {object} BenchCase
 * @property {string} name
 * @property {string} kind of the reference
 * @property {string} file
 * @property {'array' | 'capture'} source a NumPy array that is loaded beforehand, or a file that is read each time
 * @property {number} [sampleRateHz] of an array
 * @property {object} [settings] of the analysis, none where a capture is only read
 * @property {number[]} threads of the analysis
 */

const mains30m = { file: 'mains30m.npy', source: 'array', sampleRateHz: 50_000 };
const mains = { profile: 'mains', nominalFrequencyHz: 50 };

/** @type {BenchCase[]} */
export const benchCases = [
  { ...mains30m, name: 'mains 30M', kind: 'mains', settings: mains, threads: [1, 2] },
  {
    ...mains30m,
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
    source: 'array',
    sampleRateHz: 192_000,
    settings: { profile: 'tone', nominalFrequencyHz: 'auto' },
    threads: [1],
  },
  { name: 'csv 100 MB', kind: 'csv', file: 'csv100.csv', source: 'capture', threads: [1] },
  { name: 'wav 100 MB', kind: 'wav', file: 'wav100.wav', source: 'capture', threads: [1] },
  {
    name: 'job 100 MB',
    kind: 'job',
    file: 'csv100.csv',
    source: 'capture',
    settings: mains,
    threads: [1, 2],
  },
];
