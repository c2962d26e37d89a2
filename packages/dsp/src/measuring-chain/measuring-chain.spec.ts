import { describe, expect, it } from 'vitest';
import { transferFunction } from '../transfer/transfer-function.js';
import { calibratedResponse, type CalibrationRow } from './calibration-table.js';
import { measuringChainResponse } from './chain-response.js';
import { correctLines } from './correct-line.js';

const table: CalibrationRow[] = [
  { frequencyHz: 1000, gain: 0.1, phaseDeg: 170, gainUncertaintyPercent: 2, phaseUncertaintyDeg: 1 },
  { frequencyHz: 10, gain: 1, phaseDeg: -10, gainUncertaintyPercent: 1, phaseUncertaintyDeg: 0.5 },
  { frequencyHz: 2000, gain: 0.1, phaseDeg: -170 },
];

describe('calibratedResponse', () => {
  const at = calibratedResponse(table);

  it('follows a roll-off by decades and a delay by its straight phase', () => {
    // 20 dB over two decades: 10 dB at 100 Hz. The phase gains 180° over 990 Hz.
    expect(at(100)).toEqual({
      gain: expect.closeTo(Math.sqrt(0.1), 12),
      phaseDeg: expect.closeTo(-10 + (180 * 90) / 990, 10),
      gainStandard: expect.closeTo((1 + 90 / 990) / 200, 12),
      phaseStandardDeg: expect.closeTo((0.5 + (0.5 * 90) / 990) / 2, 12),
    });
    // From 170° to −170° is a turn by 20°, not by −340°.
    expect(at(1500)).toMatchObject({ phaseDeg: expect.closeTo(180, 10), gain: expect.closeTo(0.1, 12) });
    expect(at(1000)).toMatchObject({ gain: 0.1, phaseDeg: 170 });
  });

  it('has no answer beyond its rows', () => {
    expect([at(9.99), at(2001), at(0)]).toEqual(['outside-table', 'outside-table', 'outside-table']);
    const withDc = calibratedResponse([...table, { frequencyHz: 0, gain: 0.99, phaseDeg: 0 }]);
    expect(withDc(0)).toMatchObject({ gain: 0.99 });
    expect(withDc(5)).toBe('outside-table');
  });

  it('names the row at fault', () => {
    expect(() => calibratedResponse([])).toThrow(/no rows/);
    expect(() => calibratedResponse([table[0]!, { ...table[1]!, gain: 0 }])).toThrow(/Row 2 .* gain is 0/);
    expect(() => calibratedResponse([table[0]!, table[0]!])).toThrow(/1000 Hz twice/);
  });
});

describe('measuringChainResponse', () => {
  it('multiplies gains, adds phases and adds uncertainties in quadrature', () => {
    const tau = 1 / (2 * Math.PI * 100);
    const chain = measuringChainResponse([
      { kind: 'gain', gain: -0.01, gainUncertaintyPercent: 0.6, coverageFactor: 2 },
      {
        kind: 'transfer',
        transfer: transferFunction([1], [tau, 1]),
        gainUncertaintyPercent: 1.2,
        coverageFactor: 3,
      },
      { kind: 'table', rows: table },
    ]);
    expect(chain(100)).toEqual({
      gain: expect.closeTo(0.01 * Math.SQRT1_2 * Math.sqrt(0.1), 12),
      phaseDeg: expect.closeTo(180 - 45 - 10 + (180 * 90) / 990, 9),
      gainStandard: expect.closeTo(Math.hypot(0.003, 0.004, (1 + 90 / 990) / 200), 12),
      phaseStandardDeg: expect.closeTo((0.5 + (0.5 * 90) / 990) / 2, 12),
    });
    expect(chain(5000)).toBe('outside-table');
  });

  it('names the stage at fault', () => {
    expect(() => measuringChainResponse([{ kind: 'gain', gain: 0 }])).toThrow(/Stage 1 .* gain is 0/);
    const integrator = transferFunction([1], [1, 0]);
    expect(() => measuringChainResponse([{ kind: 'transfer', transfer: integrator }])).toThrow(/marginal/);
  });
});

describe('correctLines', () => {
  const tau = 1 / (2 * Math.PI * 100);
  const chain = measuringChainResponse([
    {
      kind: 'transfer',
      transfer: transferFunction([1], [tau, 1]),
      gainUncertaintyPercent: 1,
      phaseUncertaintyDeg: 2,
    },
  ]);

  it('brings back what the chain took', () => {
    const lines = [50, 150, 250].map((frequencyHz) => {
      const ratio = frequencyHz / 100;
      return {
        frequencyHz,
        rms: 7 / Math.hypot(1, ratio),
        phaseDeg: 30 - (Math.atan(ratio) * 180) / Math.PI,
      };
    });
    for (const line of correctLines(lines, chain, { floor: 0.1, coverageFactor: 3 })) {
      expect(line).toMatchObject({
        ...{ flag: null, rms: expect.closeTo(7, 10), phaseDeg: expect.closeTo(30, 10) },
        uncertainty: {
          rmsPercent: expect.closeTo(1.5, 12),
          phaseDeg: expect.closeTo(3, 12),
          coverageFactor: 3,
        },
      });
    }
  });

  it('flags a line below the floor and one outside the table instead of dividing', () => {
    const [line] = correctLines([{ frequencyHz: 2000, rms: 1e-6, phaseDeg: 0 }], chain, { floor: 0.1 });
    expect(line).toMatchObject({ flag: 'below-floor', gain: expect.closeTo(1 / Math.hypot(1, 20), 12) });
    expect(line).not.toHaveProperty('rms');
    const outside = correctLines([{ frequencyHz: 5, rms: 1, phaseDeg: 0 }], calibratedResponse(table), {
      floor: 0.01,
    });
    expect(outside[0]).toMatchObject({ flag: 'outside-table', gain: null });
    expect(() => correctLines([], chain, { floor: 0 })).toThrow(/floor is 0/);
  });

  it('keeps the sign of DC, or turns it behind a reversed stage', () => {
    const reversed = measuringChainResponse([{ kind: 'gain', gain: -2 }]);
    const [dc, order] = correctLines(
      [
        { frequencyHz: 0, rms: -6, phaseDeg: null },
        { frequencyHz: 50, rms: 6, phaseDeg: -100 },
      ],
      reversed,
      { floor: 0.1 },
    );
    expect(dc).toMatchObject({ rms: 3, phaseDeg: null });
    expect(order).toMatchObject({ rms: 3, phaseDeg: 80 });
  });
});
