/**
 * `pnpm bench [NAME …]`: the engine against reference.py, in turns. One JSON line for each case and number of threads; times
 * in milliseconds are medians over rounds, the ratio is the median of the ratios of the rounds. Needs a build of dsp and ingest.
 */
import { execFileSync } from 'node:child_process';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { benchCases } from './cases.mjs';
import { ensureData } from './data.mjs';
import { findPython, pythonVersions, runPython } from './python.mjs';

const FOLDER = fileURLToPath(new URL('../../.data/bench', import.meta.url));
const OURS = fileURLToPath(new URL('ours.mjs', import.meta.url));
/** NumPy asks the system for large pages for its arrays, which Node.js does only through the C library (glibc 2.35). */
const ENVIRONMENT = { ...process.env, GLIBC_TUNABLES: 'glibc.malloc.hugetlb=1' };
const ROUNDS = 3;
const REPEATS = 5;

/** @param {number[]} values */
const median = (values) => values.toSorted((a, b) => a - b)[values.length >> 1];

/**
 * @param {import('./cases.mjs').BenchCase} benchCase
 * @param {number} threads
 */
function measureOurs({ name, file }, threads) {
  const args = ['--expose-gc', OURS, name, join(FOLDER, file), String(threads), String(REPEATS)];
  return JSON.parse(execFileSync(process.execPath, args, { encoding: 'utf8', env: ENVIRONMENT }));
}

/**
 * @param {import('./cases.mjs').BenchCase} benchCase
 * @param {string | null} python
 */
function measureReference({ kind, file }, python) {
  if (python === null) return null;
  const line = runPython(python, [kind, join(FOLDER, file), '--repeat', String(REPEATS)]);
  return JSON.parse(line).referenceMs;
}

/**
 * @param {import('./cases.mjs').BenchCase} benchCase
 * @param {string | null} python
 */
function measure(benchCase, python) {
  const rounds = Array.from({ length: ROUNDS }, () => ({
    referenceMs: measureReference(benchCase, python),
    ours: benchCase.threads.map((threads) => measureOurs(benchCase, threads)),
  }));
  benchCase.threads.forEach((threads, i) => {
    const line = {
      case: benchCase.name,
      oursMs: median(rounds.map(({ ours }) => ours[i].oursMs)),
      referenceMs: python && median(rounds.map(({ referenceMs }) => referenceMs)),
      ratio: python && median(rounds.map(({ ours, referenceMs }) => ours[i].oursMs / referenceMs)),
      threads,
      peakMemoryMb: Math.max(...rounds.map(({ ours }) => ours[i].peakMemoryMb)),
      result: rounds[0].ours[i].result,
    };
    console.log(JSON.stringify(line));
  });
}

const python = findPython();
console.error(
  python === null
    ? 'No Python with NumPy, SciPy and pandas was found (tried python3 and python of PATH, and /usr/bin/python3): ' +
        'the engine is measured alone.'
    : `Reference: ${pythonVersions(python)}`,
);
ensureData(FOLDER, python);
const wanted = process.argv.slice(2);
for (const benchCase of benchCases) {
  if (wanted.length === 0 || wanted.some((word) => benchCase.name.includes(word))) measure(benchCase, python);
}
