import { describe, expect, it } from 'vitest';
import { addChannels, moveEntry, readEntries, readView, writeEntries } from './overlay-link.js';

const id = (n: number) => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;
const styles = (text: string) => readEntries(text).entries.map(({ style }) => style);

describe('channels of an overlay in its address', () => {
  it('come back as they were written', () => {
    const { entries } = readEntries(`${id(1)}:0,${id(2)}:3`);
    expect(entries).toEqual([
      { recordingId: id(1), channel: 0, style: 0 },
      { recordingId: id(2), channel: 3, style: 1 },
    ]);
    expect(writeEntries(entries)).toBe(`${id(1)}:0,${id(2)}:3`);
  });

  it('may leave the channel open and drop what names no recording, or one twice', () => {
    const text = `${id(1)},none,${id(1)},${id(1)}:2`;
    expect(readEntries(text).entries.map(({ channel }) => channel)).toEqual([null, 2]);
    expect(readEntries(null)).toEqual({ entries: [], leftOut: 0 });
  });

  it('are at most twelve, and the rest is counted', () => {
    const many = Array.from({ length: 14 }, (_, i) => `${id(i)}:0`).join(',');
    expect(readEntries(many).entries).toHaveLength(12);
    expect(readEntries(many).leftOut).toBe(2);
  });

  it('keep their style when another one is removed or moved', () => {
    const { entries } = readEntries(`${id(1)}:0,${id(2)}:0,${id(3)}:0`);
    const text = writeEntries(entries.slice(1));
    expect(styles(text)).toEqual([1, 2]);
    expect(styles(writeEntries(moveEntry(entries, 0, 1)))).toEqual([1, 0, 2]);
    const added = addChannels(readEntries(text).entries, [
      { recordingId: id(3), channel: 0 },
      { recordingId: id(4), channel: 1 },
    ]);
    expect(added.map(({ style }) => style)).toEqual([1, 2, 0]);
  });

  it('never share a style, whatever the address says', () => {
    expect(styles(`${id(1)}:0:5,${id(2)}:0:5,${id(3)}:0:99`)).toEqual([5, 0, 1]);
  });
});

it('a view begins with orders, logarithmic, absolute, all of them', () => {
  expect(readView(new URLSearchParams('as=relative&scale=nonsense'))).toEqual({
    by: 'order',
    scale: 'log',
    amplitude: 'relative',
    orders: 'all',
    limitSetId: null,
  });
});
