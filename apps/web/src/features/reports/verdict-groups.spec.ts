import { describe, expect, it } from 'vitest';
import { sampleVerdict } from '../../testing/sample-verdicts.js';
import { sampleId, sampleRecording } from '../../testing/samples.js';
import { groupVerdicts } from './verdict-groups.js';

const recordings = [
  sampleRecording({ id: sampleId(2), number: 'R-0010', name: 'Supply check' }),
  sampleRecording({ id: sampleId(1), number: 'R-0009', name: 'Dimmer' }),
  sampleRecording({ id: sampleId(3), number: 'R-0011', name: 'Never judged' }),
];
const verdicts = [
  sampleVerdict({ id: sampleId(71), recordingId: sampleId(2), result: 'pass' }),
  sampleVerdict({ id: sampleId(72), recordingId: sampleId(1), result: 'fail' }),
  sampleVerdict({ id: sampleId(73), recordingId: sampleId(1), result: 'pass' }),
];
const found = (search: string) =>
  groupVerdicts(verdicts, recordings, search).map(({ recording, verdicts: own }) => [
    recording.number,
    own.length,
  ]);

describe('verdicts by recording', () => {
  it('stand under their recordings in rising number; recordings never judged are left out', () => {
    expect(found('')).toEqual([
      ['R-0009', 2],
      ['R-0010', 1],
    ]);
  });

  it('are found by recording, limit set and result together', () => {
    expect(found('dimmer pass')).toEqual([['R-0009', 1]]);
    expect(found('house limits r-0010')).toEqual([['R-0010', 1]]);
    expect(found('nothing')).toEqual([]);
  });
});
