import { describe, expect, it } from 'vitest';
import { sampleReport, sampleVerdict } from '../../testing/sample-verdicts.js';
import { sampleId } from '../../testing/samples.js';
import { revisionChanges } from './revision-changes.js';

const first = sampleReport('issued');
const section = first.content.sections[0]!;

describe('what changed between two revisions', () => {
  it('is nothing where both say the same', () => {
    expect(revisionChanges(first, structuredClone(first))).toEqual([]);
  });

  it('names words, results and verdicts that differ', () => {
    const verdict = sampleVerdict({ id: sampleId(701), result: 'pass', reason: 'Within every limit' });
    const second = {
      ...first,
      title: 'Dimmer, second test',
      content: { ...first.content, result: 'pass' as const, sections: [{ ...section, verdict }] },
    };
    const changes = revisionChanges(first, second);
    expect(changes.map(({ subject }) => subject)).toEqual([
      'Title',
      'Result',
      expect.stringContaining('R-0147, i'),
    ]);
    expect(changes[2]).toMatchObject({
      before: expect.stringContaining('Over at 3'),
      after: expect.stringContaining('Within every limit'),
    });
  });

  it('names verdicts that were added or left out, and notes', () => {
    const other = {
      ...section,
      verdict: sampleVerdict({ id: sampleId(702), channelName: 'u' }),
    };
    const both = { ...first, content: { ...first.content, sections: [section, other] } };
    expect(revisionChanges(first, both)).toMatchObject([{ before: 'none' }]);
    expect(revisionChanges(both, first)).toMatchObject([{ after: 'none' }]);
  });
});
