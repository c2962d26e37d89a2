import { bandLimitedSquareCsv, demoCapturePath, demoExpectations } from '@overtally/fixtures';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';

/** A capture to upload and the THD_F that it must show. */
export interface KnownCapture {
  path: string;
  /** Name that the recording takes from its file. */
  name: string;
  thdFPercent: number;
  /** In percentage points: what the shown digits and the noise of the capture allow. */
  tolerance: number;
}

/** A band-limited square wave as CSV; its THD_F follows from b_h = 4/(πh) in closed form. */
export function squareWaveCsv(): KnownCapture {
  const square = bandLimitedSquareCsv({});
  const path = join(mkdtempSync(join(tmpdir(), 'overtally-captures-')), 'bench-square.csv');
  writeFileSync(path, square.text);
  return { path, name: 'bench-square', thdFPercent: square.thdFPercent, tolerance: 0.01 };
}

/** A generated WAV whose distortion is known in closed form. */
export function limitedToneWav(): KnownCapture {
  const fileName = 'generator-square-250hz.wav';
  const expectation = demoExpectations[fileName];
  if (!expectation) throw new Error(`Nothing is known of ${fileName}`);
  const { thdFPercent, tolerance } = expectation;
  return { path: demoCapturePath(fileName), name: basename(fileName, '.wav'), thdFPercent, tolerance };
}

/** The phase-cut current that is over class A at several orders. */
export function phaseCutCsv(): KnownCapture {
  const fileName = 'dimmer-90deg.csv';
  const expectation = demoExpectations[fileName];
  if (!expectation) throw new Error(`Nothing is known of ${fileName}`);
  const { thdFPercent, tolerance } = expectation;
  return { path: demoCapturePath(fileName), name: basename(fileName, '.csv'), thdFPercent, tolerance };
}

/** Where the waveform of `jumpingSineCsv` jumps, in seconds. */
export const jumpAtS = 0.5;

/** A sine of 50 Hz that goes on at another phase after half a second, as CSV. */
export function jumpingSineCsv(): { path: string; name: string } {
  const sampleRateHz = 10_000;
  const rows = Array.from({ length: sampleRateHz }, (_, i) => {
    const timeS = i / sampleRateHz;
    const value = 325 * Math.sin(2 * Math.PI * 50 * timeS + (timeS < jumpAtS ? 0 : 1.2));
    return `${timeS.toFixed(4)},${value.toFixed(2)}`;
  });
  const path = join(mkdtempSync(join(tmpdir(), 'overtally-captures-')), 'jumping-sine.csv');
  writeFileSync(path, ['Time [s],U [V]', ...rows, ''].join('\n'));
  return { path, name: 'jumping-sine' };
}

/** A sine of 50 Hz as it comes behind a probe of 100:1 whose ratio was set nowhere: 230 V stand there as 2.3 V. */
export function probedSineCsv(fileName: string): { name: string; mimeType: string; buffer: Buffer } {
  const rows = Array.from({ length: 10_000 }, (_, i) => {
    const timeS = i / 10_000;
    return `${timeS.toFixed(4)};${(1000 * timeS).toFixed(1)};${(2.3 * Math.SQRT2 * Math.sin(2 * Math.PI * 50 * timeS)).toFixed(6)}`;
  });
  return {
    name: fileName,
    mimeType: 'text/csv',
    buffer: Buffer.from(['Time [s];ms;U [V]', ...rows, ''].join('\n')),
  };
}
