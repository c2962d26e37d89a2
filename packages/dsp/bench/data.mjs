/** The records that are measured: those of the reference, or alike ones where there is no Python. */
import { existsSync, mkdirSync, openSync, closeSync, writeSync } from 'node:fs';
import { join } from 'node:path';
import { runPython } from './python.mjs';

const BLOCK = 1_000_000;

/**
 * @param {string} folder
 * @param {string | null} python
 */
export function ensureData(folder, python) {
  const missing = ['mains30m.npy', 'tone1m.npy'].filter((name) => !existsSync(join(folder, name)));
  if (missing.length === 0) return;
  mkdirSync(folder, { recursive: true });
  console.error(`Making records in ${folder}; this takes a minute.`);
  if (python !== null) {
    runPython(python, ['make', folder]);
    return;
  }
  writeNpy(join(folder, 'mains30m.npy'), 30_000_000, rectifier);
  writeNpy(join(folder, 'tone1m.npy'), 1_000_000, tone);
}

/** @param {number} n sample at 50 kHz */
function rectifier(n) {
  let x = 5e-3 * noise();
  for (let order = 1; order < 50; order += 2) {
    const phase = ((2 * Math.PI * order * 49.97) / 50_000) * n + 0.7 * order;
    x += ((5 * Math.exp(-order / 12)) / order ** 0.3) * Math.cos(phase);
  }
  return x;
}

/** @param {number} n sample at 192 kHz */
function tone(n) {
  const phase = ((2 * Math.PI * 997.13) / 192_000) * n;
  return Math.cos(phase) + 1e-4 * Math.cos(3 * phase) + 1e-5 * noise();
}

let state = 20_261_201;

/** Of unit variance: the sum of twelve uniform numbers (a linear congruential generator) less six. */
function noise() {
  let sum = -6;
  for (let i = 0; i < 12; i++) {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    sum += state / 2 ** 32;
  }
  return sum;
}

/**
 * @param {string} path
 * @param {number} count
 * @param {(n: number) => number} sample
 */
function writeNpy(path, count, sample) {
  const file = openSync(path, 'w');
  const dictionary = `{'descr': '<f8', 'fortran_order': False, 'shape': (${count},), }`.padEnd(117) + '\n';
  writeSync(file, Uint8Array.of(0x93, ...'NUMPY'.split('').map((c) => c.charCodeAt(0)), 1, 0, 118, 0));
  writeSync(file, dictionary);
  for (let from = 0; from < count; from += BLOCK) {
    const block = Float64Array.from({ length: Math.min(BLOCK, count - from) }, (_, i) => sample(from + i));
    writeSync(file, block);
  }
  closeSync(file);
}
