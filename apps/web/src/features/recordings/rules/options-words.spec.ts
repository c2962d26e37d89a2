import { describe, expect, it } from 'vitest';
import { optionsWords } from './options-words.js';

describe('import options in words', () => {
  it('says what is set and nothing else', () => {
    expect(optionsWords({})).toEqual([]);
    const gap = '\u00a0';
    expect(
      optionsWords({
        sampleRateHz: 12_500,
        delimiter: ';',
        decimal: ',',
        headerRows: 1,
        timeColumn: null,
        missingValues: 'interpolate',
        channels: [
          { column: 1, name: 'u1', quantity: 'voltage', unit: 'V', probeRatio: 100, inverted: true },
          { column: 'i', gain: -2 },
          { column: 3 },
        ],
      }),
    ).toEqual([
      `sample rate 12.5${gap}kHz`,
      'delimiter semicolon',
      'decimal comma',
      '1 line before the numbers',
      'no time column',
      'cells without a number bridged',
      'column 2: u1, voltage in V, probe 100 : 1, inverted',
      'column “i”: gain −2',
      'column 4',
    ]);
  });
});
