import type { ChannelAnalysis, LimitSet, SupplyVerdict } from '@overtally/contracts';
import { checkTestSupply, type SupplyCheck } from './test-supply.js';
import { unitRatio } from './units.js';

/** Nominal values of the supply as far as they were stated. */
export interface StatedSupply {
  nominalV?: number | undefined;
  frequencyHz?: number | undefined;
}

/** Usual voltages to neutral and between lines, in V (IEC 60038:2009, table 1, and 100 V, 220 V, 240 V). */
const usualVoltages = [100, 120, 127, 208, 220, 230, 240, 277, 347, 400, 480, 600, 690] as const;
const usualFrequencies = [50, 60] as const;
/** Furthest from nominal that a channel may be for its nominal voltage to be read as that of the other kind. */
const nearShare = 0.15;

const nearest = (values: readonly number[], value: number): number =>
  values.reduce((best, next) =>
    Math.abs(Math.log(next / value)) < Math.abs(Math.log(best / value)) ? next : best,
  );

interface Nominal {
  value: number;
  assumption: string | null;
}

function nominalVoltage(stated: number | undefined, measuredV: number): Nominal {
  if (stated === undefined) {
    const value = nearest(usualVoltages, measuredV);
    return {
      value,
      assumption: `a nominal voltage of ${value} V, the usual one nearest to what was measured`,
    };
  }
  const isNear = (nominal: number) => Math.abs(measuredV - nominal) <= nearShare * nominal;
  const toNeutral = stated / Math.sqrt(3);
  if (isNear(stated) || !isNear(toNeutral)) return { value: stated, assumption: null };
  const said = `${stated} V as the voltage between lines, ${Number(toNeutral.toPrecision(4))} V to neutral`;
  return { value: toNeutral, assumption: said };
}

function nominalFrequency(stated: number | undefined, measuredHz: number): Nominal {
  if (stated !== undefined) return { value: stated, assumption: null };
  const value = nearest(usualFrequencies, measuredHz);
  return { value, assumption: `a nominal frequency of ${value} Hz` };
}

const shown = 3;

function listed(checks: readonly SupplyCheck[]): string {
  const names = checks.slice(0, shown).map(({ name }) => name);
  const rest = checks.length - names.length;
  return rest > 0 ? `${names.join(', ')} and ${rest} more` : names.join(', ');
}

function summaryOf(checks: readonly SupplyCheck[], result: SupplyVerdict['result']): string {
  const asked = 'what IEC 61000-3-2 asks of the test supply';
  const those = listed(checks.filter((check) => check.result === result));
  if (result === 'pass') return `The test voltage keeps to ${asked}`;
  if (result === 'not-decidable') {
    return `Whether the test voltage keeps to ${asked} is open: ${those} not measured`;
  }
  return `The test voltage misses ${asked}: ${those}. Harmonic currents depend on the voltage, so this result holds for the supply as it was; repeat the test on a supply within these limits before it is relied on`;
}

/**
 * The voltage recorded beside a judged current against the test supply of IEC 61000-3-2, A.2; null for sets of other
 * standards and for a voltage without rms or fundamental.
 *
 * Nominal values that were not stated are taken as the nearest usual ones, and said to be. The result of the verdict
 * does not change: limits apply to the currents as measured, and the supply is a condition of the test.
 */
export function supplyVerdict(
  set: LimitSet,
  voltage: ChannelAnalysis,
  stated: StatedSupply,
): SupplyVerdict | null {
  const volts = unitRatio(voltage.unit, 'V');
  const { rms, fundamental } = voltage;
  if (set.procedure !== 'iec61000-3-2' || volts === null || !rms || !fundamental) return null;
  const nominal = nominalVoltage(stated.nominalV, rms * volts);
  const frequency = nominalFrequency(stated.frequencyHz, fundamental.frequencyHz);
  const checks = checkTestSupply(voltage, {
    nominalV: nominal.value,
    frequencyHz: frequency.value,
    // Limits in amperes are those of classes A and B, which ask nothing of the peak.
    checksPeak: set.basis !== 'absolute',
  });
  const has = (result: SupplyVerdict['result']) => checks.some((check) => check.result === result);
  const result = has('fail') ? 'fail' : has('not-decidable') ? 'not-decidable' : 'pass';
  const assumptions = [nominal.assumption, frequency.assumption].filter((text) => text !== null);
  return {
    channel: voltage.index,
    channelName: voltage.name,
    nominalV: nominal.value,
    frequencyHz: frequency.value,
    assumption: assumptions.length === 0 ? null : `Taken for granted: ${assumptions.join('; ')}`,
    summary: summaryOf(checks, result),
    result,
    checks,
  };
}
