import { z } from 'zod';
import { timestampSchema } from './common.js';
import {
  importOptionsSchema,
  readingRuleIdSchema,
  recordingSchema,
  updateRecordingSchema,
} from './recordings.js';

/** An upload that began and has not become a recording; it goes on where it stopped (tus 1.0). */
export const unfinishedUploadSchema = z.object({
  id: z.string(),
  fileName: z.string(),
  sizeBytes: z.number().int(),
  receivedBytes: z.number().int(),
  createdAt: timestampSchema,
  expiresAt: timestampSchema.describe('When what was received is dropped'),
});
export type UnfinishedUpload = z.infer<typeof unfinishedUploadSchema>;
export const unfinishedUploadListSchema = z.object({
  items: z.array(unfinishedUploadSchema),
  nextCursor: z.null(),
});

/** What an upload that arrived whole becomes. */
export const finishUploadSchema = z.strictObject({
  sha256: z
    .string()
    .regex(/^[0-9a-f]{64}$/)
    .optional()
    .describe('SHA-256 of the bytes as the sender has them; compared with what arrived'),
  import: importOptionsSchema.optional(),
  readingRuleId: readingRuleIdSchema,
  ...updateRecordingSchema.omit({ channels: true }).shape,
});
export type FinishUpload = z.infer<typeof finishUploadSchema>;

/** What came of one uploaded file: one recording, or for a ZIP archive one for each capture in it. */
export const uploadOutcomeSchema = z.object({
  items: z.array(recordingSchema),
  leftOut: z
    .array(z.object({ path: z.string(), reason: z.string() }))
    .describe('Members of an archive that became no recording, each with the reason'),
});
export type UploadOutcome = z.infer<typeof uploadOutcomeSchema>;

/** What uploads into a project are bound by. */
export const uploadLimitsSchema = z.object({
  maxFileBytes: z.number().int(),
  quotaBytes: z.number().int().nullable().describe('Bytes of sources a project may hold; null: no bound'),
  usedBytes: z.number().int(),
});
export type UploadLimits = z.infer<typeof uploadLimitsSchema>;
