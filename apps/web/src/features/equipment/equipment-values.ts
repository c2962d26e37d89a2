import { createEquipmentSchema, type CreateEquipment, type Equipment } from '@overtally/contracts';
import { z } from 'zod';
import { numberOf, numberText } from '../../lib/number-text.js';

const amount = z.string().refine((text) => text.trim() === '' || numberOf(text)! > 0, {
  message: 'Give a number above 0, or leave it empty',
});

/** Equipment as its form holds it. */
export const equipmentFormSchema = z.object({
  name: createEquipmentSchema.shape.name,
  manufacturer: z.string().trim().max(160, 'Use at most 160 characters'),
  model: z.string().trim().max(160, 'Use at most 160 characters'),
  serialNumber: z.string().trim().max(120, 'Use at most 120 characters'),
  receivedOn: z.string(),
  remark: z.string().trim().max(2000, 'Use at most 2000 characters'),
  voltageV: amount,
  currentA: amount,
  powerW: amount,
  frequencyHz: amount,
  phases: z.enum(['', '1', '2', '3']),
  emissionClass: z.enum(['', 'A', 'B', 'C', 'D']),
  modes: z
    .array(
      z.object({
        id: z.string().optional(),
        name: z.string().trim().min(1, 'Name the operating mode').max(120, 'Use at most 120 characters'),
        description: z.string().trim().max(2000, 'Use at most 2000 characters'),
        retired: z.boolean(),
        recordings: z.number(),
      }),
    )
    .superRefine((modes, context) => {
      modes.forEach(({ name }, at) => {
        if (modes.findIndex((each) => each.name === name) === at) return;
        context.addIssue({ code: 'custom', path: [at, 'name'], message: 'Another mode has this name' });
      });
    }),
});
export type EquipmentForm = z.infer<typeof equipmentFormSchema>;

const amounts = ['voltageV', 'currentA', 'powerW', 'frequencyHz'] as const;

export function toForm(equipment: Equipment | null): EquipmentForm {
  const { name = '', manufacturer = '', model = '', serialNumber = '', remark = '' } = equipment ?? {};
  const ratings = equipment?.ratings ?? {};
  const text = (value: number | undefined) => (value === undefined ? '' : numberText(value));
  return {
    ...{ name, manufacturer, model, serialNumber, remark },
    receivedOn: equipment?.receivedOn ?? '',
    voltageV: text(ratings.voltageV),
    currentA: text(ratings.currentA),
    powerW: text(ratings.powerW),
    frequencyHz: text(ratings.frequencyHz),
    phases: ratings.phases === undefined ? '' : (String(ratings.phases) as '1' | '2' | '3'),
    emissionClass: ratings.emissionClass ?? '',
    modes: (equipment?.operatingModes ?? []).map((mode) => ({ ...mode })),
  };
}

/** What to send; ratings that were left empty are not said. */
export function toEquipment(form: EquipmentForm): CreateEquipment {
  const { modes, phases, emissionClass, receivedOn } = form;
  const { name, manufacturer, model, serialNumber, remark } = form;
  const given = amounts.flatMap((key) => {
    const value = numberOf(form[key]);
    return value === undefined ? [] : [[key, value] as const];
  });
  return {
    ...{ name, manufacturer, model, serialNumber, remark },
    receivedOn: receivedOn === '' ? null : receivedOn,
    ratings: {
      ...Object.fromEntries(given),
      ...(phases === '' ? {} : { phases: Number(phases) as 1 | 2 | 3 }),
      ...(emissionClass === '' ? {} : { emissionClass }),
    },
    operatingModes: modes.map(({ id, name, description, retired }) => ({
      ...(id === undefined ? {} : { id }),
      ...{ name, description, retired },
    })),
  };
}
