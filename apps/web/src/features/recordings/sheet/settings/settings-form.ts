import { profileSchema, windowNameSchema } from '@overtally/contracts';
import { DEFAULT_MAX_ORDER } from '@overtally/dsp';
import { z } from 'zod';
import { numberOf } from '../../../../lib/number-text.js';

export const nominalChoices = ['auto', '50', '60', 'other'] as const;

/** An optional number of the form, as text; empty leaves the choice to the engine. */
const optional = (isFit: (value: number) => boolean, message: string) =>
  z.string().refine((text) => {
    const value = numberOf(text);
    return value === undefined || isFit(value);
  }, message);
const between = (least: number, most: number) => (value: number) => value >= least && value <= most;
const wholeBetween = (least: number, most: number) => (value: number) =>
  Number.isInteger(value) && value >= least && value <= most;
const percent = optional(between(0, 100), 'Give percent from 0 to 100');
const order = optional(wholeBetween(2, 200), 'Give a whole order from 2 to 200');
const channel = z.string();

const formFields = z.object({
  profile: profileSchema,
  nominal: z.enum(nominalChoices),
  nominalOtherHz: z.string(),
  maxOrder: order,
  thdMaxOrder: order,
  cyclesPerWindow: optional(wholeBetween(2, 200_000), 'Give a whole number from 2 to 200 000'),
  bandFromHz: optional((value) => value >= 0, 'Give a frequency in Hz'),
  bandToHz: optional((value) => value > 0, 'Give a frequency in Hz'),
  window: z.union([windowNameSchema, z.literal('')]),
  kaiserBeta: optional(between(0, 40), 'Give a number from 0 to 40'),
  segmentLength: optional(wholeBetween(16, 4_194_304), 'Give whole samples from 16 to 4 194 304'),
  overlapPercent: optional(between(0, 95), 'Give percent from 0 to 95'),
  pairing: z.enum(['proposed', 'chosen']),
  pairs: z.array(z.object({ voltage: channel, current: channel, phase: z.enum(['', '1', '2', '3']) })),
  sets: z.array(
    z.object({
      voltages: z.tuple([channel, channel, channel]),
      currents: z.tuple([channel, channel, channel]),
      wires: z.enum(['3w', '4w']),
    }),
  ),
  ratedCurrentA: optional((value) => value > 0, 'Give a current in A'),
  accuracy: z.array(
    z.object({ channel: z.number(), name: z.string(), readingPercent: percent, calibrationPercent: percent }),
  ),
  extent: z.enum(['whole', 'part']),
  fromS: z.string(),
  toS: z.string(),
});
type FormFields = z.infer<typeof formFields>;

/** Settings of an analysis as the form holds them; empty numbers leave the choice to the engine. */
export const settingsFormSchema = formFields.superRefine((values, context) => {
  const issue = (message: string, ...path: (string | number)[]) =>
    context.addIssue({ code: 'custom', path, message });
  checkFrequencies(values, issue);
  checkChannels(values, issue);
  const highest = numberOf(values.maxOrder) ?? DEFAULT_MAX_ORDER;
  if ((numberOf(values.thdMaxOrder) ?? 0) > highest) {
    issue(`Give at most ${highest}, the highest order listed`, 'thdMaxOrder');
  }
  if (values.extent === 'whole') return;
  const from = numberOf(values.fromS) ?? Number.NaN;
  const to = numberOf(values.toS) ?? Number.NaN;
  if (!(from >= 0)) issue('Give a time in seconds', 'fromS');
  if (!(to > from)) issue('The span must end after it begins', 'toS');
});
export type SettingsForm = z.infer<typeof settingsFormSchema>;

type Issue = (message: string, ...path: (string | number)[]) => void;

function checkFrequencies(values: FormFields, issue: Issue): void {
  const hz = numberOf(values.nominalOtherHz);
  if (values.nominal === 'other' && !(hz !== undefined && hz >= 0.1 && hz <= 1e6)) {
    issue('Give a frequency from 0.1 Hz to 1 MHz', 'nominalOtherHz');
  }
  if (values.profile !== 'tone') return;
  const [from, to] = [numberOf(values.bandFromHz), numberOf(values.bandToHz)];
  if ((from === undefined) !== (to === undefined)) {
    issue('Give both ends of the band, or none', from === undefined ? 'bandFromHz' : 'bandToHz');
  }
  if (from !== undefined && to !== undefined && !(to > from)) {
    issue('The band must end above its start', 'bandToHz');
  }
}

function checkChannels({ pairing, pairs, sets }: FormFields, issue: Issue): void {
  if (pairing === 'proposed') return;
  pairs.forEach(({ voltage, current }, index) => {
    if (voltage === '') issue('Choose a voltage', 'pairs', index, 'voltage');
    if (current === '') issue('Choose a current', 'pairs', index, 'current');
  });
  sets.forEach(({ voltages, currents }, index) => {
    const all = [...voltages, ...currents];
    if (all.includes('') || new Set(all).size < all.length) {
      issue('Choose six channels, each once', 'sets', index, 'wires');
    }
  });
}
