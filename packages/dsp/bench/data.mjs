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
  writeNpy(join(folder, 'mains30m.npy'), 30_000_000, rectifier(), 5e-3);
  writeNpy(join(folder, 'tone1m.npy'), 1_000_000, tone(), 1e-5);
}

/**
 * @typedef {object} Component
 * @property {number} amplitude
 * @property {number} angle radians per sample
 * @property {number} phase radians
 */

/** @returns {Component[]} odd orders of 49.97 Hz at 50 kHz */
function rectifier() {
  return Array.from({ length: 25 }, (_, i) => 2 * i + 1).map((order) => ({
    amplitude: (5 * Math.exp(-order / 12)) / order ** 0.3,
    angle: (2 * Math.PI * order * 49.97) / 50_000,
    phase: 0.7 * order,
  }));
}

/** @returns {Component[]} 997.13 Hz at 192 kHz with a third harmonic */
function tone() {
  const angle = (2 * Math.PI * 997.13) / 192_000;
  return [
    { amplitude: 1, angle, phase: 0 },
    { amplitude: 1e-4, angle: 3 * angle, phase: 0 },
  ];
}

/**
 * Adds a component to a block by turning a phasor from sample to sample.
 * @param {Float64Array} block
 * @param {number} from position of the block in its record
 * @param {Component} component
 */
function addComponent(block, from, { amplitude, angle, phase }) {
  const [cosine, sine] = [Math.cos(angle), Math.sin(angle)];
  let re = amplitude * Math.cos(angle * from + phase);
  let im = amplitude * Math.sin(angle * from + phase);
  for (let i = 0; i < block.length; i++) {
    block[i] += re;
    [re, im] = [re * cosine - im * sine, re * sine + im * cosine];
  }
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
 * @param {Component[]} components
 * @param {number} noiseRms
 */
function writeNpy(path, count, components, noiseRms) {
  const file = openSync(path, 'w');
  const dictionary = `{'descr': '<f8', 'fortran_order': False, 'shape': (${count},), }`.padEnd(117) + '\n';
  writeSync(file, Uint8Array.of(0x93, ...'NUMPY'.split('').map((c) => c.charCodeAt(0)), 1, 0, 118, 0));
  writeSync(file, dictionary);
  for (let from = 0; from < count; from += BLOCK) {
    const block = Float64Array.from({ length: Math.min(BLOCK, count - from) }, () => noiseRms * noise());
    for (const component of components) addComponent(block, from, component);
    writeSync(file, block);
  }
  closeSync(file);
}
