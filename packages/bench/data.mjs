/** The records that are measured: those of the reference, or alike ones where there is no Python. */
import { Buffer } from 'node:buffer';
import { existsSync, mkdirSync, openSync, closeSync, writeSync } from 'node:fs';
import { join } from 'node:path';
import { runPython } from './python.mjs';

const BLOCK = 1_000_000;

const NAMES = ['mains30m.npy', 'tone1m.npy', 'csv100.csv', 'wav100.wav'];

/**
 * @param {string} folder
 * @param {string | null} python
 */
export function ensureData(folder, python) {
  if (NAMES.every((name) => existsSync(join(folder, name)))) return;
  mkdirSync(folder, { recursive: true });
  console.error(`Making records in ${folder}; this takes a minute.`);
  if (python !== null) {
    runPython(python, ['make', folder]);
    return;
  }
  writeNpy(join(folder, 'mains30m.npy'), 30_000_000, rectifier(5, 50_000), 5e-3);
  writeNpy(join(folder, 'tone1m.npy'), 1_000_000, tone(), 1e-5);
  writeCsv(join(folder, 'csv100.csv'), 3_600_000, [rectifier(300, 50_000), rectifier(5, 50_000)]);
  writeWav(join(folder, 'wav100.wav'), 26_000_000, rectifier(0.3, 96_000));
}

/**
 * @typedef {object} Component
 * @property {number} amplitude
 * @property {number} angle radians per sample
 * @property {number} phase radians
 */

/**
 * @param {number} scale
 * @param {number} sampleRateHz
 * @returns {Component[]} odd orders of 49.97 Hz
 */
function rectifier(scale, sampleRateHz) {
  return Array.from({ length: 25 }, (_, i) => 2 * i + 1).map((order) => ({
    amplitude: (scale * Math.exp(-order / 12)) / order ** 0.3,
    angle: (2 * Math.PI * order * 49.97) / sampleRateHz,
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
 * @param {number} from position of the block in its record
 * @param {number} count
 * @param {Component[]} components
 * @param {number} noiseRms
 */
function makeBlock(from, count, components, noiseRms) {
  const block = Float64Array.from({ length: count }, () => noiseRms * noise());
  for (const component of components) addComponent(block, from, component);
  return block;
}

/**
 * @param {string} path
 * @param {string | Uint8Array} header
 * @param {number} count
 * @param {(from: number, count: number) => string | ArrayBufferView} block bytes of so many samples
 */
function writeBlocks(path, header, count, block) {
  const file = openSync(path, 'w');
  writeSync(file, header);
  for (let from = 0; from < count; from += BLOCK) writeSync(file, block(from, Math.min(BLOCK, count - from)));
  closeSync(file);
}

/**
 * @param {string} path
 * @param {number} count
 * @param {Component[]} components
 * @param {number} noiseRms
 */
function writeNpy(path, count, components, noiseRms) {
  const dictionary = `{'descr': '<f8', 'fortran_order': False, 'shape': (${count},), }`.padEnd(117) + '\n';
  const header = Buffer.concat([Buffer.from('\x93NUMPY\x01\0\x76\0', 'latin1'), Buffer.from(dictionary)]);
  writeBlocks(path, header, count, (from, length) => makeBlock(from, length, components, noiseRms));
}

/**
 * @param {string} path
 * @param {number} count
 * @param {[Component[], Component[]]} channels
 */
function writeCsv(path, count, [voltage, current]) {
  writeBlocks(path, '# bench capture\ntime_s,u_V,i_A\n', count, (from, length) => {
    const u = makeBlock(from, length, voltage, 0.3);
    const i = makeBlock(from, length, current, 5e-3);
    const row = (value, k) => `${((from + k) / 50_000).toFixed(5)},${value.toFixed(5)},${i[k].toFixed(6)}\n`;
    return Array.from(u, row).join('');
  });
}

/**
 * 16 bits, two channels, at 96 kHz.
 * @param {string} path
 * @param {number} count frames
 * @param {Component[]} components
 */
function writeWav(path, count, components) {
  const header = Buffer.alloc(44);
  header.write('RIFF    WAVEfmt ', 'latin1');
  header.writeUInt32LE(36 + 4 * count, 4);
  [16, 0x2_0001, 96_000, 384_000, 0x10_0004].forEach((value, k) => header.writeUInt32LE(value, 16 + 4 * k));
  header.write('data', 36, 'latin1');
  header.writeUInt32LE(4 * count, 40);
  writeBlocks(path, header, count, (from, length) => {
    const left = makeBlock(from, length, components, 3e-4);
    return Int16Array.from({ length: 2 * length }, (_, k) => 32_767 * 0.4 * left[k >> 1] * (k % 2 ? 0.8 : 1));
  });
}
