import {
  createLimitSetSchema,
  quantitySchema,
  type CreateLimitSet,
  type Quantity,
} from '@overtally/contracts';
import { z } from 'zod';

/** The form of a custom set: numbers as they are typed. */
export interface LimitSetFormValues {
  title: string;
  standard: string;
  edition: string;
  appliesWhen: string;
  quantity: Quantity;
  unit: string;
  basis: CreateLimitSet['basis'];
  orders: { order: string; limit: string }[];
  totals: { name: TotalName; limit: string; maxOrder: string }[];
  source: string;
}

export type TotalName = CreateLimitSet['totals'][number]['name'];

const typed = (message: string) =>
  z
    .string()
    .trim()
    .min(1, message)
    .transform((text) => Number(text.replace(',', '.')))
    .refine((value) => Number.isFinite(value) && value > 0, { message });
const order = z
  .string()
  .trim()
  .regex(/^\d+$/, 'A whole number')
  .transform(Number)
  .refine((value) => value >= 2 && value <= 200, { message: 'From 2 to 200' });

const { shape } = createLimitSetSchema;
const rowsSchema = z.object({
  ...shape,
  standard: shape.standard.unwrap(),
  edition: shape.edition.unwrap(),
  appliesWhen: shape.appliesWhen.unwrap(),
  orders: z
    .array(z.object({ order, limit: typed('A number above zero') }))
    .min(1, 'Give at least one order')
    .max(199),
  totals: z
    .array(
      z.object({
        name: shape.totals.unwrap().element.shape.name,
        limit: typed('A number above zero'),
        maxOrder: order,
      }),
    )
    .max(5),
  quantity: quantitySchema,
});

/** What is typed, checked by the fields of the contracts' schema; messages stand at their fields. */
export const limitSetFormSchema = rowsSchema.superRefine((set, context) => {
  if (set.basis === 'absolute' && set.unit.trim() === '') {
    context.addIssue({ code: 'custom', path: ['unit'], message: 'Give the unit of the limits, such as A' });
  }
  set.orders.forEach((entry, index) => {
    const first = set.orders.findIndex((other) => other.order === entry.order);
    if (first < index) {
      context.addIssue({
        code: 'custom',
        path: ['orders', index, 'order'],
        message: `Order ${entry.order} stands in row ${first + 1} already`,
      });
    }
  });
});

export const emptyLimitSet: LimitSetFormValues = {
  title: '',
  standard: '',
  edition: '',
  appliesWhen: '',
  quantity: 'current',
  unit: 'A',
  basis: 'absolute',
  orders: [3, 5, 7, 9].map((each) => ({ order: String(each), limit: '' })),
  totals: [],
  source: '',
};

/** Unit that limits of a quantity usually have; empty where there is none to suggest. */
export const usualUnit: Record<Quantity, string> = {
  voltage: 'V',
  current: 'A',
  power: 'W',
  sound_pressure: 'Pa',
  acceleration: 'm/s²',
  velocity: 'm/s',
  dimensionless: '',
  other: '',
};

/** Totals that make sense for what the limits refer to: THD and TDD are percentages, the others amounts. */
export const totalWords: Record<TotalName, string> = {
  THD: 'THD, % of the fundamental',
  TDD: 'TDD, % of the demand current IL',
  THC: 'THC, all harmonics',
  POHC: 'POHC, odd orders from 21',
  PWHC: 'PWHC, orders from 14 weighted by order',
};
