import { thdF, thdR, type ChannelAnalysis } from '@overtally/dsp';
import type { Quantities } from '../quantities.js';

/** Highest orders for which THD is asked: audio, and the two of mains. */
const thdOrders = [10, 40, 50];
/** Orders that count in the total rms. */
const totalOrders = 50;

/** Plain quantities and distortion of a wave of orders of one fundamental. */
export function waveQuantities(channel: ChannelAnalysis): Quantities {
  const { fundamental, harmonics, mean } = channel;
  const rms = harmonics.map((harmonic) => harmonic.rms);
  const distortion = thdOrders.flatMap((highest): [string, number | null][] => [
    [`thd_f_${highest}`, thdF(rms, highest)],
    [`thd_r_${highest}`, thdR(rms, highest)],
  ]);
  return {
    f0_hz: fundamental?.frequencyHz ?? null,
    dc: mean,
    record_rms: channel.rms,
    total_rms: Math.hypot(mean ?? 0, ...rms.slice(0, totalOrders)),
    harmonic_rms: rms,
    phase_deg: harmonics.map((harmonic) => harmonic.phaseDeg),
    phase_zc_deg: harmonics.map((harmonic) => harmonic.phaseZeroCrossingDeg),
    crest_factor: channel.crestFactor,
    form_factor: channel.formFactor,
    ...Object.fromEntries(distortion),
  };
}
