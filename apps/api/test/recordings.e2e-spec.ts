import type { Analysis, Recording } from '@overtally/contracts';
import { createHash } from 'node:crypto';
import type TestAgent from 'supertest/lib/agent.js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { csvOf, squareThdFPercent, squareWave, wavOf } from './support/captures.js';
import { settled, upload } from './support/recordings.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const sampleRateHz = 10_000;
const square = squareWave(sampleRateHz, 10_000);
const squareCsv = csvOf(square, sampleRateHz);

let test: TestApp;
let technician: TestAgent;

beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
  technician = await test.signIn('technician');
});
afterAll(() => test.close());

async function figuresOf(recording: Recording) {
  const { body } = (await technician.get(`/api/analyses/${recording.latestAnalysisId}`).expect(200)) as {
    body: Analysis;
  };
  return body.channels[0]!;
}

describe('a capture on its way from upload to figures', () => {
  let recording: Recording;

  it('is received with its hash, number and name', async () => {
    recording = await upload(technician, test.project.id, squareCsv, 'Rectifier 3.csv', {
      eut: 'PSU 12, S/N 4',
    });
    expect(recording).toMatchObject({
      number: 'R-0001',
      name: 'Rectifier 3',
      eut: 'PSU 12, S/N 4',
      duplicateOf: null,
      latestAnalysisId: null,
      // SHA-256 by Node's own implementation over the bytes that were sent.
      file: {
        name: 'Rectifier 3.csv',
        size: squareCsv.length,
        sha256: createHash('sha256').update(squareCsv).digest('hex'),
      },
    });
  });

  it('is read and analysed', async () => {
    recording = await settled(technician, recording.id);
    expect(recording).toMatchObject({
      status: 'ready',
      problem: null,
      format: 'csv',
      sampleRateHz,
      sampleCount: square.length,
      durationS: 1,
      channels: [{ index: 0, quantity: 'voltage', unit: 'V', gain: 1, offset: 0 }],
    });
    const channel = await figuresOf(recording);
    expect(channel.fundamental?.frequencyHz).toBeCloseTo(50, 4);
    expect(Math.abs(channel.thdFPercent! - squareThdFPercent)).toBeLessThan(0.01);
    // rms of order h is 4 / (pi h sqrt 2), the Fourier series of the square wave.
    for (const { order, rms } of channel.harmonics) {
      const expected = order % 2 === 1 && order < 40 ? 4 / (Math.PI * order * Math.SQRT2) : 0;
      expect(Math.abs(rms - expected)).toBeLessThan(1e-4);
    }
  });
});
