import type { Analysis, ImportOptions, Recording } from '@overtally/contracts';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { wavOf } from './support/captures.js';
import { settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const rateHz = 10_000;
/** Half of full scale, 50 Hz: 0.5 cos(2 pi 50 t + 30 degrees). */
const half = Float32Array.from(
  { length: 10_000 },
  (_, n) => 0.5 * Math.cos((2 * Math.PI * 50 * n) / rateHz + Math.PI / 6),
);

let test: TestApp;
let technician: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  technician = await test.signIn('technician');
});
afterAll(() => test.close());

async function read(channel: Partial<NonNullable<ImportOptions['channels']>[number]>) {
  const stated = { channels: [{ column: 0, quantity: 'voltage', unit: 'V', ...channel }] };
  const fields = { import: JSON.stringify(stated) };
  const { id } = await upload(technician, test.project.id, wavOf([half], rateHz), 'half.wav', fields);
  const recording: Recording = await settled(technician, id);
  const path = `/api/analyses/${recording.latestAnalysisId}`;
  const analysis = (await technician.get(path).expect(200)).body as Analysis;
  return { recording, fundamental: analysis.channels[0]!.harmonics[0]! };
}

// By hand: 0.5 of 400 V at full scale, through a probe of 10:1, is 2000 V, whose rms is 2000 / sqrt(2).
it('full scale and probe ratio give volts, and inversion turns the phase by 180 degrees', async () => {
  const scale = { fullScale: 400, probeRatio: 10 };
  const upright = await read(scale);
  expect(upright.recording.channels).toMatchObject([{ gain: 4000, offset: 0, unit: 'V' }]);
  expect(upright.fundamental.rms).toBeCloseTo(2000 / Math.SQRT2, 2);
  expect(upright.fundamental.phaseDeg).toBeCloseTo(30, 2);

  const inverted = await read({ ...scale, inverted: true });
  expect(inverted.recording.channels).toMatchObject([{ gain: -4000 }]);
  expect(inverted.fundamental.rms).toBeCloseTo(2000 / Math.SQRT2, 2);
  expect(inverted.fundamental.phaseDeg).toBeCloseTo(30 - 180, 2);
});
