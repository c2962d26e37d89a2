import type { FrequencyTrack } from '../fundamental/frequency-track.js';
import type { Flag, SpectrumResult } from '../types.js';
import { adcSaturatedFlag } from './adc-saturated.js';
import { clippedFlag } from './clipped.js';
import { dcHeavyFlag } from './dc-heavy.js';
import { discontinuityFlag } from './discontinuity.js';
import type { ScanFindings } from './flag-scan.js';
import { frequencyDriftFlag } from './frequency-drift.js';
import { lowResolutionFlag } from './low-resolution.js';
import { nearNyquistFlag } from './near-nyquist.js';
import { noPeriodicComponentFlag } from './no-periodic-component.js';
import { notSynchronousFlag, type WindowSynchronism } from './not-synchronous.js';
import { orderBeyondNyquistFlag } from './order-beyond-nyquist.js';
import { recordLengthFlag } from './record-length.js';

/** What is known of a channel when its flags are raised. */
export interface FlagContext {
  findings: ScanFindings;
  sampleRateHz: number;
  unit: string;
  nominalFrequencyHz: number | 'auto';
  maxOrder: number;
  /** DC component and rms of everything else. */
  mean: number;
  acRms: number;
  /** The fundamental and how many orders are listed; null when there is none. */
  fundamental: { frequencyHz: number; rms: number; listedOrders: number } | null;
  track: FrequencyTrack | null;
  spectrum: SpectrumResult;
  /** null without synchronous windows or without a track to compare them with. */
  windows: WindowSynchronism | null;
}

/** All quality flags of a channel, errors first, each with what it rests on. */
export function qualityFlags(context: FlagContext): Flag[] {
  const { findings, sampleRateHz, unit, fundamental, track, spectrum, nominalFrequencyHz } = context;
  const found = fundamental?.frequencyHz ?? null;
  const cycleHz = found ?? (nominalFrequencyHz === 'auto' ? null : nominalFrequencyHz);
  const flags = [
    cycleHz === null ? null : recordLengthFlag(findings.sampleCount / sampleRateHz, cycleHz),
    fundamental === null ? noPeriodicComponentFlag(nominalFrequencyHz) : null,
    adcSaturatedFlag(findings, sampleRateHz),
    clippedFlag(findings, sampleRateHz),
    discontinuityFlag(findings, sampleRateHz, found, unit),
    found === null ? null : frequencyDriftFlag(track, found, sampleRateHz),
    notSynchronousFlag(context.windows, sampleRateHz),
    fundamental && nearNyquistFlag(spectrum, sampleRateHz, fundamental.rms),
    dcHeavyFlag(context.mean, context.acRms, unit),
    lowResolutionFlag(findings, context.acRms),
    fundamental &&
      orderBeyondNyquistFlag(
        fundamental.frequencyHz,
        fundamental.listedOrders,
        context.maxOrder,
        sampleRateHz,
      ),
  ];
  const severities = ['error', 'warning', 'info'];
  return flags
    .filter((flag) => flag !== null)
    .sort((a, b) => severities.indexOf(a.severity) - severities.indexOf(b.severity));
}
