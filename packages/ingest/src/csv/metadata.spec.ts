import { describe, expect, it } from 'vitest';
import { readMetadata, statedSampleRateHz } from './metadata.js';

const rateOf = (line: string) => statedSampleRateHz(readMetadata([line], ','));

describe('lines before the table', () => {
  it('become pairs of key and value', () => {
    const lines = [
      'Instrument,Recorder 7',
      'Comment,"inrush, second try"',
      '',
      '# Operator: N. N.',
      'Report',
    ];
    expect(readMetadata(lines, ',')).toEqual({
      Instrument: 'Recorder 7',
      Comment: 'inrush, second try',
      Operator: 'N. N.',
    });
  });

  it.each([
    ['Sample Interval,1e-5', 100000],
    ['Sample Interval,10,us', 100000],
    ['Sampling rate: 50000 Hz', 50000],
    ['Sampling Rate [kHz],50', 50000],
    ['Abtastrate: 12.8 kHz', 12800],
    ['Abtastintervall: 0.1 ms', 10000],
    ['sample_rate=1 MS/s', 1e6],
    ['fs,48000', 48000],
  ])('%s states %d Hz', (line, rate) => {
    expect(rateOf(line)).toBeCloseTo(rate, 6);
  });

  it.each(['Record Length,2500', 'Sample rate,auto', 'Sample rate,0', 'Sampling rate,10 V'])(
    '%s states no rate',
    (line) => {
      expect(rateOf(line)).toBeNull();
    },
  );
});
