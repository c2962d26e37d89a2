import type { ChannelAnalysis } from '@overtally/contracts';
import { unitRatio } from './units.js';

/** One requirement on the test supply with what was measured. */
export interface SupplyCheck {
  /** What is checked, such as `voltage` or `harmonic 3`. */
  name: string;
  unit: string;
  value: number | null;
  /** Lowest and highest allowed value; null where there is no such end. */
  from: number | null;
  upTo: number | null;
  result: 'pass' | 'fail' | 'not-decidable';
}

/** What the test supply should be. */
export interface NominalSupply {
  /** Nominal voltage of the channel, such as 230 V from line to neutral. */
  nominalV: number;
  frequencyHz: number;
  /** Classes A and B have no requirement on the peak. */
  checksPeak: boolean;
}

const voltageTolerance = 0.02;
const frequencyTolerance = 0.005;
const crest = { from: 1.4, upTo: 1.42 };
const highestOrder = 40;
/** A value exactly at its end passes in spite of the rounding of binary arithmetic. */
const roundingTolerance = 1e-9;

const oddHarmonics: Readonly<Record<number, number>> = { 3: 0.9, 5: 0.4, 7: 0.3, 9: 0.2 };

/** Highest harmonic of the test voltage in percent of the fundamental. */
function allowedPercent(order: number): number {
  return oddHarmonics[order] ?? (order % 2 === 0 && order <= 10 ? 0.2 : 0.1);
}

type Ends = Pick<SupplyCheck, 'from' | 'upTo'>;

function check(name: string, unit: string, value: number | null, { from, upTo }: Ends): SupplyCheck {
  if (value === null) return { name, unit, value, from, upTo, result: 'not-decidable' };
  const isLow = from !== null && value < from * (1 - roundingTolerance);
  const isHigh = upTo !== null && value > upTo * (1 + roundingTolerance);
  return { name, unit, value, from, upTo, result: isLow || isHigh ? 'fail' : 'pass' };
}

const around = (nominal: number, tolerance: number): Ends => ({
  from: nominal * (1 - tolerance),
  upTo: nominal * (1 + tolerance),
});

/**
 * Checks a voltage channel, recorded while the equipment runs, against the test supply of IEC 61000-3-2, A.2 (from
 * memory, high confidence): voltage within 2.0 % and frequency within 0.5 % of nominal; harmonics at most 0.9 % (3),
 * 0.4 % (5), 0.3 % (7), 0.2 % (9 and even 2 to 10) and 0.1 % (others to 40) of the fundamental; peak 1.40 to 1.42
 * times the rms, except for classes A and B. An order that was not analysed is `not-decidable`. The angle of the
 * peak (87° to 93°) and the angles between phases (120° within 1.5°) are not checked here.
 */
export function checkTestSupply(channel: ChannelAnalysis, nominal: NominalSupply): SupplyCheck[] {
  const volts = unitRatio(channel.unit, 'V');
  const fundamental = channel.fundamental;
  const rms = volts === null || channel.rms === null ? null : channel.rms * volts;
  const percents = new Map(channel.harmonics.map((each) => [each.order, shareOf(each, fundamental?.rms)]));
  const harmonics = Array.from({ length: highestOrder - 1 }, (_, i) => {
    const order = i + 2;
    const ends = { from: null, upTo: allowedPercent(order) };
    return check(`harmonic ${order}`, '%', percents.get(order) ?? null, ends);
  });
  const peak = check('peak over rms', '', channel.crestFactor, crest);
  return [
    check('voltage', 'V', rms, around(nominal.nominalV, voltageTolerance)),
    check(
      'frequency',
      'Hz',
      fundamental?.frequencyHz ?? null,
      around(nominal.frequencyHz, frequencyTolerance),
    ),
    ...harmonics,
    ...(nominal.checksPeak ? [peak] : []),
  ];
}

function shareOf({ subgroupRms, rms }: ChannelAnalysis['harmonics'][number], fundamental = 0): number | null {
  return fundamental > 0 ? (100 * (subgroupRms ?? rms)) / fundamental : null;
}
