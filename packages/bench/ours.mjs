/** `node --expose-gc ours.mjs CASE FILE THREADS REPEATS`: times the engine on a file, prints one JSON line. */
/* global gc */
import { performance } from 'node:perf_hooks';
import { readCapture } from './capture.mjs';
import { benchCases } from './cases.mjs';
import { createEngine } from './engine.mjs';
import { readShared } from './npy.mjs';

const [name, file, threads, repeats] = process.argv.slice(2);
const { source, sampleRateHz, settings } = benchCases.find((benchCase) => benchCase.name === name);
const engine = settings === undefined ? null : createEngine(settings, Number(threads));
const loaded = source === 'array' ? arrayCapture() : null;

function arrayCapture() {
  const channels = [{ index: 0, name: 'i', quantity: 'current', unit: 'A' }];
  return { sampleRateHz, channels, samples: [readShared(file)] };
}

/** @returns {Promise<object>} what is told of the result */
async function work() {
  const capture = loaded ?? (await readCapture(file));
  if (engine === null) return { sampleRateHz: capture.sampleRateHz, rows: capture.samples[0].length };
  const { channels } = await engine.analyse(capture);
  const told = channels.map(({ fundamental, thdFPercent }) => ({
    fundamentalHz: fundamental?.frequencyHz ?? null,
    thdFPercent,
  }));
  return told.length === 1 ? told[0] : told;
}

const allMs = [];
let result;
for (let i = 0; i < Number(repeats); i++) {
  // What the round before left is given back outside the time, as Python does at once.
  gc();
  const begin = performance.now();
  result = await work();
  allMs.push(performance.now() - begin);
}
await engine?.close();
console.log(
  JSON.stringify({
    oursMs: allMs.toSorted((a, b) => a - b)[allMs.length >> 1],
    peakMemoryMb: Math.round(process.resourceUsage().maxRSS / 1024),
    result,
  }),
);
