import { quantitySchema, type Channel, type Recording, type UpdateRecording } from '@overtally/contracts';
import { z } from 'zod';
import { benchSchema, fromBench, toBench } from '../../bench/bench-values.js';

const decimal = (text: string) => (text.trim() === '' ? Number.NaN : Number(text.trim().replace(',', '.')));
const number = (message: string) => z.string().refine((text) => Number.isFinite(decimal(text)), { message });

/** Bench data and channels as the dialog holds them. */
export const editSchema = z.object({
  name: z.string().trim().min(1, 'Name the recording').max(160, 'Use at most 160 characters'),
  eut: z.string().trim().max(200, 'Use at most 200 characters'),
  measuringChain: z.string().trim().max(200, 'Use at most 200 characters'),
  instrument: z.string().trim().max(200, 'Use at most 200 characters'),
  capturedAt: z.string(),
  remark: z.string().trim().max(2000, 'Use at most 2000 characters'),
  bench: benchSchema,
  channels: z.array(
    z.object({
      index: z.number(),
      name: z.string().trim().min(1, 'Name the channel').max(80, 'Use at most 80 characters'),
      quantity: quantitySchema,
      unit: z.string().trim().max(20, 'Use at most 20 characters'),
      gain: number('Give a number').refine((text) => decimal(text) !== 0, {
        message: 'A gain of 0 leaves nothing',
      }),
      offset: number('Give a number'),
    }),
  ),
});
export type EditValues = z.infer<typeof editSchema>;

const two = (part: number) => String(part).padStart(2, '0');

/** Moment as a local date and time field holds it, to the second. */
export function toLocalField(iso: string | null): string {
  if (iso === null) return '';
  const at = new Date(iso);
  const day = `${at.getFullYear()}-${two(at.getMonth() + 1)}-${two(at.getDate())}`;
  return `${day}T${two(at.getHours())}:${two(at.getMinutes())}:${two(at.getSeconds())}`;
}

export function toEditValues(recording: Recording): EditValues {
  const { name, eut, measuringChain, instrument, remark, capturedAt, channels } = recording;
  return {
    ...{ name, eut, measuringChain, instrument, remark },
    capturedAt: toLocalField(capturedAt),
    bench: toBench(recording),
    channels: channels.map((channel) => ({
      index: channel.index,
      name: channel.name,
      quantity: channel.quantity,
      unit: channel.unit,
      gain: String(channel.gain),
      offset: String(channel.offset),
    })),
  };
}

type ChannelChange = NonNullable<UpdateRecording['channels']>[number];

function channelChange(values: EditValues['channels'][number], before: Channel): ChannelChange | null {
  const wanted = { ...values, gain: decimal(values.gain), offset: decimal(values.offset) };
  const keys = ['name', 'quantity', 'unit', 'gain', 'offset'] as const;
  const changed = keys.filter((key) => wanted[key] !== before[key]);
  if (changed.length === 0) return null;
  return { index: values.index, ...Object.fromEntries(changed.map((key) => [key, wanted[key]])) };
}

/** What to send: bench data as it stands, and of the channels only what was changed. */
export function toUpdate(values: EditValues, recording: Recording): UpdateRecording {
  const { channels, capturedAt, bench, eut, ...texts } = values;
  const said = fromBench(bench);
  // The line of other equipment takes the place of a text that was left alone.
  const keepsEut = eut !== recording.eut || said.equipmentId === (recording.equipment?.id ?? null);
  const changes = channels.flatMap((channel) => {
    const before = recording.channels.find(({ index }) => index === channel.index);
    const change = before && channelChange(channel, before);
    return change ? [change] : [];
  });
  const untouched = capturedAt === toLocalField(recording.capturedAt);
  return {
    ...texts,
    ...said,
    ...(keepsEut ? { eut } : {}),
    // A field of whole seconds must not cut the fraction off a moment that was left alone.
    ...(untouched ? {} : { capturedAt: capturedAt ? new Date(capturedAt).toISOString() : null }),
    ...(changes.length > 0 ? { channels: changes } : {}),
  };
}
