import { expect, it } from 'vitest';
import { arrayMemory } from './array-memory.js';

it('finds the memory of arrays at any depth, each once', () => {
  const rms = new Float64Array(4);
  const flagged = new Uint8Array(2);
  const found = arrayMemory({ ok: true, result: { rms, again: rms, channels: [{ flagged, name: 'u' }] } });
  expect(found).toEqual([rms.buffer, flagged.buffer]);
});

it('leaves alone what is a part of other memory, or shared', () => {
  const whole = new Float64Array(8);
  const shared = new Int32Array(new SharedArrayBuffer(4));
  expect(arrayMemory({ part: whole.subarray(2, 4), shared, nothing: null })).toEqual([]);
});
