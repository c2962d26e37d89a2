import { z } from 'zod';
import { maxChannelIndex } from './common.js';

/** What was followed from window to window. Those with an order (or a band number) need `order` in the query. */
export const seriesFigureSchema = z.enum([
  'frequency',
  'rms',
  'thd',
  'thdg',
  'thds',
  'pwhd',
  'line',
  'group',
  'subgroup',
  'interharmonicGroup',
  'centredSubgroup',
  'band',
]);
export type SeriesFigure = z.infer<typeof seriesFigureSchema>;

/** `window` as computed; 3 s (150/180 cycles) and 10 min by root mean square (IEC 61000-4-30, 4.4 and 4.5). */
export const aggregationSchema = z.enum(['window', '3s', '10min']);
export type Aggregation = z.infer<typeof aggregationSchema>;

export const seriesQuerySchema = z.object({
  channel: z.coerce.number().int().min(0).max(maxChannelIndex).default(0),
  figure: seriesFigureSchema.default('rms'),
  order: z.coerce
    .number()
    .int()
    .min(0)
    .max(200)
    .default(1)
    .describe('Order; lower order of interharmonics; number of the band from 0'),
  aggregation: aggregationSchema.default('window'),
  maxPoints: z.coerce.number().int().min(16).max(20000).default(4000),
});
export type SeriesQuery = z.infer<typeof seriesQuerySchema>;

/** All orders of a figure over time, as a table. */
export const seriesTableQuerySchema = seriesQuerySchema.pick({
  channel: true,
  figure: true,
  aggregation: true,
});
export type SeriesTableQuery = z.infer<typeof seriesTableQuerySchema>;

/** A figure over time; when thinned, each point is the largest value of its stretch. */
export const seriesSchema = z.object({
  channel: z.number().int(),
  figure: seriesFigureSchema,
  order: z.number().int().nullable(),
  unit: z.string().describe('Unit of the values: of the channel, Hz or %'),
  aggregation: aggregationSchema,
  intervalS: z.number().describe('Length of one interval before thinning'),
  timeS: z.array(z.number()).describe('Starts of the intervals, from the first sample of the span'),
  value: z.array(z.number().nullable()),
  flagged: z.array(z.boolean()).describe('True where the interval holds a gap, a step or a clipped crest'),
  thinned: z.boolean(),
});
export type Series = z.infer<typeof seriesSchema>;
