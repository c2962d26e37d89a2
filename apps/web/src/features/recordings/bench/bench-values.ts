import type { Equipment, FinishUpload, MeasuringChainListItem, Recording } from '@overtally/contracts';
import { z } from 'zod';
import { numberOf, numberText } from '../../../lib/number-text.js';

const amount = (min: number, max: number) =>
  z.string().refine((text) => inRange(numberOf(text), min, max), {
    message: `Give a number from ${min} to ${max}, or leave it empty`,
  });
const positive = z.string().refine((text) => inRange(numberOf(text), Number.MIN_VALUE, 1e5), {
  message: 'Give a number above 0, or leave it empty',
});
const words = (most: number) => z.string().trim().max(most, `Use at most ${most} characters`);

/** What was tested, how, through what and under which conditions, as fields hold it; empty: not said. */
export const benchSchema = z.object({
  equipmentId: z.string(),
  operatingModeId: z.string(),
  measuringChainId: z.string(),
  ambientTemperatureC: amount(-100, 200),
  relativeHumidityPercent: amount(0, 100),
  supplyVoltageV: positive,
  supplyFrequencyHz: positive,
  supply: words(200),
  place: words(200),
  remark: words(2000),
});
export type BenchValues = z.infer<typeof benchSchema>;

export const emptyBench: BenchValues = {
  ...{ equipmentId: '', operatingModeId: '', measuringChainId: '' },
  ...{ ambientTemperatureC: '', relativeHumidityPercent: '', supplyVoltageV: '', supplyFrequencyHz: '' },
  ...{ supply: '', place: '', remark: '' },
};

const amounts = [
  'ambientTemperatureC',
  'relativeHumidityPercent',
  'supplyVoltageV',
  'supplyFrequencyHz',
] as const;
const texts = ['supply', 'place', 'remark'] as const;

export function toBench({ equipment, operatingMode, chain, conditions }: Recording): BenchValues {
  const numbers = amounts.map((key): [string, string] => {
    const value = conditions[key];
    return [key, value === undefined ? '' : numberText(value)];
  });
  return {
    ...emptyBench,
    equipmentId: equipment?.id ?? '',
    operatingModeId: operatingMode?.id ?? '',
    measuringChainId: chain?.id ?? '',
    ...Object.fromEntries([
      ...numbers,
      ...texts.map((key): [string, string] => [key, conditions[key] ?? '']),
    ]),
  };
}

export type BenchData = Required<
  Pick<FinishUpload, 'equipmentId' | 'operatingModeId' | 'measuringChainId' | 'conditions'>
>;

/** What to send. */
export function fromBench(values: BenchValues): BenchData {
  const numbers = amounts.flatMap((key) => {
    const value = numberOf(values[key]);
    return value === undefined ? [] : [[key, value] as const];
  });
  const said = texts.flatMap((key) =>
    values[key].trim() === '' ? [] : [[key, values[key].trim()] as const],
  );
  return {
    equipmentId: values.equipmentId || null,
    operatingModeId: values.equipmentId && values.operatingModeId ? values.operatingModeId : null,
    measuringChainId: values.measuringChainId || null,
    conditions: Object.fromEntries<number | string>([...numbers, ...said]),
  };
}

/** Values without what is not there any more, or retired since they were kept. */
export function stillOffered(
  values: BenchValues,
  equipment: readonly Equipment[],
  chains: readonly MeasuringChainListItem[],
): BenchValues {
  const piece = equipment.find(({ id, retiredAt }) => id === values.equipmentId && retiredAt === null);
  const mode = piece?.operatingModes.find(({ id, retired }) => id === values.operatingModeId && !retired);
  const chain = chains.find(({ id, retiredAt }) => id === values.measuringChainId && retiredAt === null);
  return {
    ...values,
    equipmentId: piece?.id ?? '',
    operatingModeId: mode?.id ?? '',
    measuringChainId: chain?.id ?? '',
  };
}

function inRange(value: number | undefined, min: number, max: number): boolean {
  return value === undefined || (value >= min && value <= max);
}
