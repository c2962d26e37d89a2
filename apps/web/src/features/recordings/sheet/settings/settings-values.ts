import { profileSchema, settingsSchema, windowNameSchema, type Settings } from '@overtally/contracts';
import { z } from 'zod';

const nominalChoices = ['auto', '50', '60', 'other'] as const;
const numberOf = (text: string) => (text.trim() === '' ? undefined : Number(text.trim().replace(',', '.')));

const order = (message: string) =>
  z.string().refine(
    (text) => {
      const value = numberOf(text);
      return value === undefined || (Number.isInteger(value) && value >= 2 && value <= 200);
    },
    { message },
  );

/** Settings of an analysis as the form holds them; empty numbers leave the choice to the engine. */
export const settingsFormSchema = z
  .object({
    profile: profileSchema,
    nominal: z.enum(nominalChoices),
    nominalOtherHz: z.string(),
    maxOrder: order('Give a whole order from 2 to 200'),
    thdMaxOrder: order('Give a whole order from 2 to 200'),
    window: z.union([windowNameSchema, z.literal('')]),
    extent: z.enum(['whole', 'part']),
    fromS: z.string(),
    toS: z.string(),
  })
  .superRefine((values, context) => {
    const issue = (path: string, message: string) =>
      context.addIssue({ code: 'custom', path: [path], message });
    const hz = numberOf(values.nominalOtherHz);
    if (values.nominal === 'other' && !(hz !== undefined && hz >= 0.1 && hz <= 1e6)) {
      issue('nominalOtherHz', 'Give a frequency from 0.1 Hz to 1 MHz');
    }
    const highest = numberOf(values.maxOrder) ?? 50;
    if ((numberOf(values.thdMaxOrder) ?? 0) > highest) {
      issue('thdMaxOrder', `Give at most ${highest}, the highest order listed`);
    }
    if (values.extent === 'whole') return;
    const from = numberOf(values.fromS) ?? Number.NaN;
    const to = numberOf(values.toS) ?? Number.NaN;
    if (!(from >= 0)) issue('fromS', 'Give a time in seconds');
    if (!(to > from)) issue('toS', 'The span must end after it begins');
  });
export type SettingsForm = z.infer<typeof settingsFormSchema>;

const text = (value: number | undefined) => (value === undefined ? '' : String(value));

/** Orders that THD counts where none is stated: a stored default is left to the engine, so that it follows the profile. */
const thdDefault: Record<Settings['profile'], number> = { mains: 40, general: 40, tone: 10 };

/** Form values of earlier settings; the part in view is offered as the span. */
export function toSettingsForm(settings: Settings, view: { fromS: number; toS: number }): SettingsForm {
  const known = nominalChoices.find((choice) => choice === String(settings.nominalFrequencyHz));
  const span = settings.span ?? view;
  return {
    profile: settings.profile,
    nominal: known ?? 'other',
    nominalOtherHz: known ? '' : String(settings.nominalFrequencyHz),
    maxOrder: text(settings.maxOrder),
    thdMaxOrder: settings.thdMaxOrder === thdDefault[settings.profile] ? '' : text(settings.thdMaxOrder),
    window: settings.window ?? '',
    extent: settings.span ? 'part' : 'whole',
    fromS: String(Number(span.fromS.toPrecision(9))),
    toS: String(Number(span.toS.toPrecision(9))),
  };
}

/** Settings to send; those that the form does not show are kept. */
export function toSettings(values: SettingsForm, earlier: Settings): Settings {
  const nominal = values.nominal === 'other' ? numberOf(values.nominalOtherHz) : Number(values.nominal);
  const { cyclesPerWindow } = earlier;
  return settingsSchema.parse({
    profile: values.profile,
    nominalFrequencyHz: values.nominal === 'auto' ? 'auto' : nominal,
    maxOrder: numberOf(values.maxOrder),
    thdMaxOrder: numberOf(values.thdMaxOrder),
    window: values.window || undefined,
    cyclesPerWindow: values.profile === 'mains' ? cyclesPerWindow : undefined,
    span: values.extent === 'part' ? { fromS: numberOf(values.fromS), toS: numberOf(values.toS) } : undefined,
  });
}
