import { readNpy } from '../../storage/npy.js';
import type { Storage } from '../../storage/storage.js';

/** Where the samples of a channel lie, and what makes engineering values of them. */
export interface StoredSamples {
  samplesKey: string;
  gain: number;
  offset: number;
  /** Index in the record of the first sample that counts. */
  first: number;
}

/** Engineering values `from` up to but not including `to`, counted from the first sample that counts. */
export async function readScaled(
  storage: Storage,
  { samplesKey, gain, offset, first }: StoredSamples,
  from: number,
  to: number,
): Promise<Float64Array> {
  const samples = await readNpy(storage, samplesKey, first + from, first + to);
  if (gain === 1 && offset === 0) return samples;
  for (let i = 0; i < samples.length; i += 1) samples[i] = samples[i]! * gain + offset;
  return samples;
}
