import type { AnalysisSettings } from '@overtally/dsp';
import { z } from 'zod';
import { analyseOneChannel, nominalOf } from '../analyse-case.js';
import type { Mapper } from '../quantities.js';

/** The band of the band-limited THD+N, Hz. */
const audioBandHz = { fromHz: 20, toHz: 20_000 };
const defaultOrders = [2, 10] as const;
/** Orders that are listed relative to the tone, from 2. */
const listedOrders = 4;

const toneSettings = z.object({
  harmonics_taken_out_of_snr: z.tuple([z.number().int(), z.number().int()]).default([...defaultOrders]),
});

/** Family 6: single-tone figures of a converter or an amplifier. */
export const singleTones: Mapper = async (folder, one) => {
  const [, highestOrder] = toneSettings.parse(one.analysis).harmonics_taken_out_of_snr;
  const settings: AnalysisSettings = {
    profile: 'tone',
    nominalFrequencyHz: nominalOf(one),
    thdMaxOrder: highestOrder,
    bandHz: audioBandHz,
  };
  const channel = await analyseOneChannel(folder, one, settings);
  const { tone, sinadDb } = channel;
  return {
    f0_hz: channel.fundamental?.frequencyHz ?? null,
    level_dbfs: tone?.levelDbfs ?? null,
    sinad_db: sinadDb,
    snr_db: channel.snrDb,
    sfdr_dbc: channel.sfdrDb,
    enob: channel.enobBits,
    enob_fs: tone?.enobFullScaleBits ?? null,
    [`thd_f_${highestOrder}_db`]: decibelsOfPercent(channel.thdFPercent),
    harmonics_dbc: tone?.harmonicsDbc.slice(0, listedOrders) ?? null,
    thdn_r_db: decibelsOfPercent(channel.thdPlusNPercent),
    thdn_f_db: sinadDb === null ? null : -sinadDb,
    thdn_r_20_20k_db: decibelsOfPercent(tone?.thdPlusNBandPercent ?? null),
  };
};

function decibelsOfPercent(percent: number | null): number | null {
  return percent === null ? null : 20 * Math.log10(percent / 100);
}
