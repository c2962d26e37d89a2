import type { OrderVerdict, TotalVerdict, VerdictParameters } from '@overtally/contracts';
import { comparisonReason } from './comparison-reason.js';
import { classify, worst, type Decision, type Judgement } from './decision.js';
import { judgeByIec61000_3_12, referenceFloor } from './iec61000-3-12.js';
import { judgeByIec61000_3_2 } from './iec61000-3-2.js';
import type { Measurement } from './measurement.js';
import { isDecidable, orderCases, orderVerdict, type OrderCase } from './order-cases.js';
import { overallReason } from './overall-reason.js';
import type { ResolvedLimits } from './resolve.js';
import { judgeTotal } from './totals.js';
import { judgeWaveform } from './waveform.js';

/** What one set of chosen limits says of a channel. */
export interface JudgedLimits {
  label: string | null;
  result: Judgement;
  reason: string;
  orders: OrderVerdict[];
  totals: TotalVerdict[];
}

/** What a channel is judged with. */
export interface Judging {
  measurement: Measurement;
  parameters: VerdictParameters;
  decision: Decision;
  /** Why nothing of the channel can be decided; null when something can. */
  gap: string | null;
}

function judgePlainly(orderCase: OrderCase): OrderVerdict {
  if (!isDecidable(orderCase)) return orderVerdict(orderCase, 'not-decidable', orderCase.gap);
  const { mean, limit, decision } = orderCase;
  const result = classify(mean, limit, decision);
  return orderVerdict(orderCase, result, comparisonReason('Mean', mean, limit, result));
}

function judgeOrders(
  { set }: ResolvedLimits,
  { measurement, parameters, decision, gap }: Judging,
): { orders: OrderVerdict[]; totals: TotalVerdict[] } {
  const cases = orderCases(set, measurement, parameters, decision, gap);
  switch (set.procedure) {
    case 'iec61000-3-2':
      return judgeByIec61000_3_2(cases, measurement, decision, set.shortExcursion ?? false);
    case 'iec61000-3-12':
      return { orders: judgeByIec61000_3_12(cases, measurement, parameters), totals: [] };
    case 'plain':
      return { orders: cases.map(judgePlainly), totals: [] };
  }
}

/** Judges a channel by chosen limits: their orders by the set's procedure, their totals, the shape of the current. */
export function judgeLimits(limits: ResolvedLimits, judging: Judging): JudgedLimits {
  const { set, label, waveform } = limits;
  const { measurement, parameters, decision, gap } = judging;
  const judged = judgeOrders(limits, judging);
  const floor = set.procedure === 'iec61000-3-12' ? referenceFloor(measurement, parameters) : 0;
  const totals = [
    ...set.totals.map((total) => judgeTotal(total, set, measurement, parameters, decision, gap, floor)),
    ...(waveform === null ? [] : [judgeWaveform(waveform, measurement.currentShape ?? null)]),
  ];
  const result = worst([...judged.orders, ...totals].map((row) => row.result));
  const reason = overallReason(result, judged.orders, totals);
  return { label, result, reason, orders: judged.orders, totals: [...judged.totals, ...totals] };
}
