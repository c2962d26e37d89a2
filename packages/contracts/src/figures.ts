import { z } from 'zod';

/** A figure's expanded uncertainty by the GUM (JCGM 100), in the unit of the figure, with what it is made of. */
export const uncertaintySchema = z.object({
  expanded: z.number().min(0).describe('U = k·u, in the unit of the figure'),
  coverageFactor: z.number().positive().describe('k, 2 for a level of confidence of about 95 %'),
  contributors: z
    .array(
      z.object({
        source: z.enum(['calibration', 'accuracy', 'quantisation', 'noise', 'synchronisation', 'fit']),
        standard: z.number().min(0).describe('Standard uncertainty u_i, in the unit of the figure'),
      }),
    )
    .describe('Combined by root sum of squares, the largest first'),
});
export type Uncertainty = z.infer<typeof uncertaintySchema>;

/** What a figure did over the windows of a record; windows that are flagged are left out. */
export const statisticsSchema = z.object({
  mean: z.number(),
  max: z.number(),
  p95: z.number().describe('95th percentile'),
  p99: z.number().describe('99th percentile'),
});
export type Statistics = z.infer<typeof statisticsSchema>;

/** What a flag rests on. */
export const flagEvidenceSchema = z.object({
  count: z.number().int().min(0).describe('How often it was seen'),
  timesS: z
    .array(z.number())
    .describe('The first places, seconds from the first sample of the analysed span'),
  value: z.number().nullable().describe('The figure that was compared'),
  limit: z.number().nullable().describe('What it was compared with'),
  unit: z.string().nullable().describe('Unit of value and limit'),
});
export type FlagEvidence = z.infer<typeof flagEvidenceSchema>;

/** A peak of the spectrum with interpolated frequency and amplitude. */
export const spectralLineSchema = z.object({
  frequencyHz: z.number(),
  rms: z.number(),
  familyIndex: z.number().int().nullable().describe('Index into `families`'),
  order: z.number().int().nullable().describe('Order within its family'),
});
export type SpectralLine = z.infer<typeof spectralLineSchema>;

/** A harmonic series found among the peaks. */
export const harmonicFamilySchema = z.object({
  fundamentalHz: z.number(),
  orders: z.array(z.number().int()),
  shareOfPower: z.number().min(0).max(1).describe('Its share of the power of all listed lines'),
});
export type HarmonicFamily = z.infer<typeof harmonicFamilySchema>;

/** Single-tone figures beside SINAD, SNR, SFDR and ENOB (IEEE 1241, IEC 60268-3). */
export const toneSchema = z.object({
  levelDbfs: z.number().nullable().describe('Level of the tone, a full-scale sine is 0 dBFS'),
  enobFullScaleBits: z.number().nullable().describe('ENOB referred to a full-scale sine'),
  noiseDensity: z.number().nullable().describe('Noise floor, unit of the channel per √Hz'),
  thdPlusNBandPercent: z.number().nullable().describe('THD+N within `bandHz` only'),
  bandHz: z.object({ fromHz: z.number(), toHz: z.number() }).nullable(),
  harmonicsDbc: z.array(z.number().nullable()).describe('Orders 2, 3, … relative to the tone'),
});
export type Tone = z.infer<typeof toneSchema>;

/** A band of 200 Hz between 2 kHz and 9 kHz (IEC 61000-4-7, annex B). */
export const bandSchema = z.object({
  centreHz: z.number(),
  rms: z.number().describe('Root mean square over the windows'),
  maxRms: z.number(),
});
export type Band = z.infer<typeof bandSchema>;

/** Frequency by counted cycles over 10 s (IEC 61000-4-30, 5.1). */
export const countedFrequencySchema = z.object({
  startS: z.number(),
  frequencyHz: z.number(),
  cycles: z.number().int(),
});
export type CountedFrequency = z.infer<typeof countedFrequencySchema>;
