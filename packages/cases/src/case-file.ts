import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { z } from 'zod';

const channelSchema = z.object({
  name: z.string(),
  unit: z.string().default(''),
  scale: z.number().default(1),
  offset_code: z.number().default(0),
});
export type CaseChannel = z.infer<typeof channelSchema>;

const fileSchema = z.object({
  name: z.string(),
  sample_rate_hz: z.number().nullish(),
  time_column: z.string().nullish(),
  bits: z.number().int().nullish(),
  channels: z.array(channelSchema).nullish(),
});
export type CaseFile = z.infer<typeof fileSchema>;

const plainObject = z.record(z.string(), z.unknown());

/** Families whose cases without a file carry their input in `generator`; anywhere else it tells the answer. */
const familiesWithInput = [7, 8];

const caseSchema = z
  .object({
    id: z.string(),
    family: z.number().int(),
    files: z.array(fileSchema).default([]),
    analysis: plainObject.nullish(),
    generator: plainObject.nullish(),
  })
  .transform(({ analysis, generator, ...rest }) => {
    const isInput = rest.files.length === 0 && familiesWithInput.includes(rest.family);
    return { ...rest, analysis: analysis ?? {}, input: (isInput && generator) || null };
  });

/** A reference case without its expected values and without the way it was made. */
export type ReferenceCase = z.infer<typeof caseSchema>;

/**
 * The cases that `cases.json` of a folder describes.
 * @throws Error when the file is not there or not of that form
 */
export async function readCases(folder: string): Promise<ReferenceCase[]> {
  const text = await readFile(join(folder, 'cases.json'), 'utf8');
  return z.object({ cases: z.array(caseSchema) }).parse(JSON.parse(text)).cases;
}
