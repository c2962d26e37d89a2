import { expect, it } from 'vitest';
import type { UploadItem } from '../upload-item.js';
import { countWords, progressWords, remainingWords, spokenStatus } from './upload-words.js';

const plain = (text: string) => text.replaceAll('\u00a0', ' ');
const item = (state: UploadItem['state'], sizeBytes: number, sentBytes = 0): UploadItem => ({
  ...{
    id: 1,
    file: new File(['x'.repeat(sizeBytes)], 'a.csv'),
    path: 'a.csv',
    reading: {},
    state,
    sentBytes,
  },
  ...{ speed: null, url: null, sha256: null, outcome: null, error: null, reason: null },
});

it('says how far an upload is, how fast it goes and how long it takes', () => {
  expect(plain(progressWords(41_800_000, 68_000_000, 5_240_000))).toBe(
    '61 %, 41.8 MB of 68.0 MB, 5.24 MB/s, 5 s left',
  );
  expect(plain(progressWords(999_999, 1_000_000, null))).toMatch(/^99 %/);
  // 600 MB at 5 MB/s take two minutes.
  expect(plain(remainingWords(600e6, 5e6))).toBe('2 min left');
});

it('counts what is under way, and speaks of the whole in steps of ten percent', () => {
  const items = [item('sending', 200, 90), item('waiting', 100), item('done', 100, 100), item('failed', 500)];
  expect(countWords(items)).toBe('1 uploading, 1 waiting, 1 of 4 received, 1 not received');
  expect(spokenStatus(items)).toMatch(/, 40 percent$/);
});
