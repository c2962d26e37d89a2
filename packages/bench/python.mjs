/** Runs the reference, which needs Python with NumPy, SciPy and pandas. */
import { execFileSync, spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const SCRIPT = fileURLToPath(new URL('reference.py', import.meta.url));
const CANDIDATES = ['python3', 'python', '/usr/bin/python3'];

/** @returns {string | null} the first Python that has what the reference needs */
export function findPython() {
  const fits = (command) =>
    spawnSync(command, ['-c', 'import numpy, scipy.signal, pandas'], { stdio: 'ignore' }).status === 0;
  return CANDIDATES.find(fits) ?? null;
}

/** @param {string} python */
export function pythonVersions(python) {
  const script =
    'import platform, numpy, scipy; print(f"Python {platform.python_version()}, NumPy {numpy.__version__}, SciPy {scipy.__version__}")';
  return execFileSync(python, ['-c', script], { encoding: 'utf8' }).trim();
}

/**
 * @param {string} python
 * @param {string[]} args
 * @returns {string} what it printed
 */
export function runPython(python, args) {
  return execFileSync(python, [SCRIPT, ...args], { encoding: 'utf8' });
}
