/** `node ours.mjs CASE FILE THREADS REPEATS`: times the engine on a file, prints one JSON line. */
import { performance } from 'node:perf_hooks';
import { benchCases } from './cases.mjs';
import { createEngine } from './engine.mjs';
import { readShared } from './npy.mjs';

const [name, file, threads, repeats] = process.argv.slice(2);
const { settings, sampleRateHz } = benchCases.find((benchCase) => benchCase.name === name);
const engine = await createEngine(readShared(file), settings, sampleRateHz, Number(threads));
const allMs = [];
let analysis;
for (let i = 0; i < Number(repeats); i++) {
  const begin = performance.now();
  analysis = await engine.analyse();
  allMs.push(performance.now() - begin);
}
await engine.close();
const { fundamental, thdFPercent } = analysis.channels[0];
console.log(
  JSON.stringify({
    oursMs: allMs.toSorted((a, b) => a - b)[allMs.length >> 1],
    peakMemoryMb: Math.round(process.resourceUsage().maxRSS / 1024),
    result: { fundamentalHz: fundamental?.frequencyHz ?? null, thdFPercent },
  }),
);
