import { describe, expect, it } from 'vitest';
import { harmonicTable } from './harmonic-table.js';
import { oneCycle, partialSum } from './partial-sum.js';
import { ordersForResidual, residualRmsByOrder } from './residual-by-order.js';
import type { FourierSeries } from './types.js';

/** Square wave ±1, rising edge at 0: b_h = 4/(πh), h odd (textbook); all orders above the last one are the rest. */
function square(lastOrder: number): FourierSeries {
  const components = Array.from({ length: Math.ceil(lastOrder / 2) }, (_, i) => ({
    order: 2 * i + 1,
    rms: (4 / (Math.PI * (2 * i + 1))) * Math.SQRT1_2,
    phaseDeg: -90,
  }));
  const held = components.reduce((sum, { rms }) => sum + rms * rms, 0);
  return { frequencyHz: 50, dc: 0, components, restRms: Math.sqrt(1 - held) };
}

describe('partialSum', () => {
  it('overshoots a jump by 8.949 % of it (Gibbs)', () => {
    // Wilbraham and Gibbs: the peak of the partial sums of a ±1 square tends to (2/π) Si(π) = 1.178979744.
    const peak = Math.max(...partialSum(square(399), 399, 16_000));
    expect(peak).toBeCloseTo(1.178979744, 4);
  });

  it('adds orders one by one', () => {
    const points = 8;
    const first = partialSum(square(9), 1, points);
    first.forEach((y, n) => expect(y).toBeCloseTo((4 / Math.PI) * Math.sin((2 * Math.PI * n) / points), 12));
    expect(partialSum({ ...square(9), dc: 2 }, 0, points)).toEqual(new Float64Array(points).fill(2));
    // Quarter cycle: 4/π (1 − 1/3 + 1/5).
    expect(partialSum(square(9), 6, points)[2]).toBeCloseTo((4 / Math.PI) * (1 - 1 / 3 + 1 / 5), 12);
  });

  it('draws the whole series as one cycle, without orders of unknown phase', () => {
    const series = square(5);
    expect(oneCycle(series, 16)).toEqual(partialSum(series, 5, 16));
    const withoutThird = series.components.map((c) => (c.order === 3 ? { ...c, phaseDeg: null } : c));
    expect(oneCycle({ ...series, components: withoutThird }, 8)[2]).toBeCloseTo(
      (4 / Math.PI) * (1 + 1 / 5),
      12,
    );
  });
});

describe('residualRmsByOrder', () => {
  it('follows the closed form of the square wave', () => {
    // rms 1; without the fundamental √(1 − 8/π²) = 0.435236178, which is the THD_R of a square wave.
    const { acRms, byMagnitude, byOrder, ordersByMagnitude } = residualRmsByOrder(square(49));
    expect(acRms).toBeCloseTo(1, 12);
    expect(byMagnitude[1]).toBeCloseTo(0.435236178, 9);
    expect(byOrder.slice(0, 3).map((x) => x.toFixed(9))).toEqual([
      '1.000000000',
      '0.435236178',
      '0.435236178',
    ]);
    expect(byOrder[3]).toBeCloseTo(Math.sqrt(1 - (8 / Math.PI ** 2) * (1 + 1 / 9)), 12);
    expect(ordersByMagnitude.slice(0, 3)).toEqual([1, 3, 5]);
    expect([byMagnitude.length, byOrder.length]).toEqual([26, 50]);
  });

  it('takes orders by magnitude, of equals the lower one first', () => {
    const rms = { 1: 1, 2: 3, 3: 2, 5: 3 };
    const components = Object.entries(rms).map(([order, value]) => ({
      order: Number(order),
      rms: value,
      phaseDeg: null,
    }));
    const result = residualRmsByOrder({ frequencyHz: 50, dc: 7, components: components.reverse() });
    expect(result.ordersByMagnitude).toEqual([2, 5, 3, 1]);
    expect(result.byMagnitude.map((x) => x ** 2)).toEqual([23, 14, 5, 1, 0].map((x) => expect.closeTo(x, 9)));
    expect(result.byOrder.map((x) => x ** 2)).toEqual([23, 22, 13, 9, 9, 0].map((x) => expect.closeTo(x, 9)));
  });
});

describe('ordersForResidual', () => {
  it('counts the orders of a square wave for 20 % rms', () => {
    // After the odd orders to 1, 3, 5, …: √(1 − (8/π²) Σ 1/h²) = 0.435236, 0.315226, 0.258736, 0.224504, 0.200986, 0.183565.
    const found = ordersForResidual(square(101), 20)!;
    expect(found.orders).toEqual([1, 3, 5, 7, 9, 11]);
    expect(found.residualPercent).toBeCloseTo(18.3565498, 6);
    expect(ordersForResidual(square(101), 100)!.orders).toEqual([]);
  });

  it('is null where the orders do not suffice or there is no wave', () => {
    expect(ordersForResidual(square(9), 5)).toBeNull();
    expect(ordersForResidual({ frequencyHz: 50, dc: 3, components: [] }, 5)).toBeNull();
  });
});

describe('harmonicTable', () => {
  it('lists DC and orders with both conventions of phase', () => {
    const rows = harmonicTable({
      frequencyHz: 50,
      dc: -2,
      components: [
        { order: 3, rms: 5, phaseDeg: 40 },
        { order: 1, rms: 200, phaseDeg: -60 },
        { order: 5, rms: 0.01, phaseDeg: null },
      ],
    });
    expect(rows.map((row) => row.order)).toEqual([0, 1, 3, 5]);
    expect(rows[0]).toMatchObject({ frequencyHz: 0, rms: -2, percent: -1, phaseDeg: null });
    expect(rows[1]).toMatchObject({ frequencyHz: 50, percent: 100, phaseDeg: -60, phaseZeroCrossingDeg: 0 });
    // ψ_3 = 40 + 3·60 − 2·90 degrees.
    expect(rows[2]).toMatchObject({ frequencyHz: 150, percent: 2.5, phaseZeroCrossingDeg: 40 });
    expect(rows[3]).toMatchObject({ phaseDeg: null, phaseZeroCrossingDeg: null });
  });

  it('has no percent without a fundamental', () => {
    const [dc, second] = harmonicTable({
      frequencyHz: 50,
      dc: 1,
      components: [{ order: 2, rms: 1, phaseDeg: 0 }],
    });
    expect([dc!.percent, second!.percent, second!.phaseZeroCrossingDeg]).toEqual([null, null, null]);
  });
});
