import type { ReportSection, Settings } from '@overtally/contracts';
import { basisOfChannel } from '@overtally/limits';
import type { Fact } from './facts.js';
import { formatFigure, formatGiven, formatPercent, formatQuantity } from './format.js';
import { profileName } from './words.js';

type Section = Pick<ReportSection, 'analysis' | 'verdict'>;

const standards: Record<Settings['profile'], string> = {
  mains: 'IEC 61000-4-7:2002 with amendment 1:2008, synchronous windows',
  tone: 'IEC 60268-3 and IEEE Std 1241, single tone in a windowed spectrum',
  general: 'Averaged windowed spectra (Welch), no standard of measurement claimed',
};

const procedures: Record<Section['verdict']['limitSet']['procedure'], string> = {
  'iec61000-3-2':
    'IEC 61000-3-2: the average over the observation is compared with the limit, the highest 1.5 s smoothed value with 150 % of it (or 200 %, as the standard allows); currents below 0.6 % of the input current or 5 mA are disregarded.',
  'iec61000-3-12':
    'IEC 61000-3-12: the average over the observation is compared with the limit, the highest 1.5 s smoothed value with 150 % of it.',
  plain: 'The value of each order is compared with its limit.',
};

/** Measurement and limits by their standards: one entry of the list of methods (7.8.2.1 f). */
export function methodName({ analysis, verdict }: Section): string {
  const { standard, edition, title } = verdict.limitSet;
  const limits = [standard || title, edition].filter((part) => part !== '').join(', ');
  return `Measurement: ${standards[analysis.settings.profile]}. Limits: ${limits}.`;
}

/** How the numbers of a section came about. */
export function methodFacts(section: Section): Fact[] {
  const { analysis, verdict } = section;
  const { settings, channel } = analysis;
  return [
    ['Method of measurement', standards[settings.profile]],
    ['Window', windowWords(section)],
    ['Grouping and smoothing', groupingWords(section)],
    ['Statistic compared', verdict.limitSet.statistic ?? procedures[verdict.limitSet.procedure]],
    ['Settings', settingsWords(settings)],
    ['Uncertainty', uncertaintyWords(section)],
    ...(channel.interharmonics.length > 0 ? [interharmonicFact(section)] : []),
    ['Decision rule', verdict.decisionRuleText],
  ];
}

function windowWords({ analysis: { channel, settings } }: Section): string {
  const { windows } = channel;
  if (windows !== null) {
    const { count, cycles, samplesPerWindow, flaggedCount, synchronisationErrorPercent: error } = windows;
    const kept = flaggedCount === 0 ? '' : `; ${flaggedCount} flagged and kept out of the statistics`;
    const off = error === null ? '' : `; off whole cycles by ${formatPercent(error, 4)} at most`;
    return `${count} rectangular windows of ${cycles} cycles (${formatFigure(samplesPerWindow, 6)} samples each), without gap or overlap${off}${kept}`;
  }
  const { window = 'chosen by the engine', segmentLength, overlapPercent } = settings;
  const length = segmentLength === undefined ? '' : `, segments of ${segmentLength} samples`;
  const overlap = overlapPercent === undefined ? '' : `, overlap ${formatGiven(overlapPercent)} %`;
  return `${window}${length}${overlap}`;
}

const groupingOf: Record<string, string> = {
  'smoothed groups':
    'Groups around each order (IEC 61000-4-7, 5.5.1), each smoothed by a first-order low-pass of 1.5 s; the value is the mean over the record.',
  groups: 'Groups around each order (IEC 61000-4-7, 5.5.1), root mean square over the windows; no smoothing.',
  subgroups:
    'Subgroups around each order (IEC 61000-4-7, 5.6), root mean square over the windows; no smoothing.',
  'single lines': 'Single lines of the spectrum; no grouping, no smoothing.',
};

function groupingWords({ analysis: { channel } }: Section): string {
  const basis = basisOfChannel(channel);
  return groupingOf[basis] ?? basis;
}

/** The statement on uncertainty with its coverage factor (7.8.3.1 c; JCGM 100:2008, 7.2.4). */
function uncertaintyWords({ verdict, analysis }: Section): string {
  const stated = verdict.parameters.expandedUncertaintyPercent;
  const ending = 'k = 2, a level of confidence of about 95 % for a normal distribution (JCGM 100:2008).';
  if (stated !== undefined) {
    return `Expanded uncertainty of each order as given for this verdict: ${formatGiven(stated)} % of its value, ${ending}`;
  }
  if (verdict.orders.every(({ uncertainty }) => uncertainty === null)) {
    return 'Not evaluated: neither the settings nor the verdict state the uncertainty of the measuring chain.';
  }
  const contributors = analysis.channel.uncertainty['fundamental.rms']?.contributors ?? [];
  const sources = contributors.map(({ source }) => source).join(', ');
  const made = sources === '' ? '' : `, combined from ${sources}`;
  return `Expanded uncertainty of each order as stated in the table${made}; ${ending}`;
}

function interharmonicFact({ analysis: { channel } }: Section): Fact {
  const largest = channel.interharmonics.reduce((most, each) =>
    each.centredSubgroupRms > most.centredSubgroupRms ? each : most,
  );
  const [from, to] = largest.betweenOrders;
  const value = formatQuantity(largest.centredSubgroupRms, channel.unit);
  return [
    'Interharmonics',
    `Not judged. Largest centred subgroup: ${value} between orders ${from} and ${to}.`,
  ];
}

function settingsWords(settings: Settings): string {
  const { nominalFrequencyHz: nominal, span } = settings;
  return [
    profileName(settings.profile),
    nominal === 'auto' ? 'fundamental searched' : `nominal frequency ${formatGiven(nominal)} Hz`,
    settings.window && `${settings.window} window for the drawn spectrum`,
    settings.cyclesPerWindow && `${settings.cyclesPerWindow} cycles per window`,
    settings.maxOrder && `orders up to ${settings.maxOrder}`,
    settings.thdMaxOrder && `THD up to order ${settings.thdMaxOrder}`,
    span && `from ${formatGiven(span.fromS)} s to ${formatGiven(span.toS)} s`,
  ]
    .filter((part) => typeof part === 'string')
    .join('; ');
}
