import { describe, expect, it } from 'vitest';
import { settingsSchema, spectrumQuerySchema, updateNoteSchema } from './analyses.js';
import { idSchema, pageQuerySchema } from './common.js';
import { createVerdictSchema } from './limits.js';
import { waveformQuerySchema } from './recordings.js';
import { updateReportSchema } from './reports.js';

const id = '3f1c7a52-9d0e-4b7a-8c21-5e6f7a8b9c0d';

/** JSON merge semantics of PATCH (RFC 7396): a member that is absent leaves the target's member as it is. */
describe('a change', () => {
  it('speaks of the fields it names and of no other', () => {
    expect(updateNoteSchema.parse({ text: 'Six-pulse' })).toEqual({ text: 'Six-pulse' });
    expect(updateReportSchema.parse({ title: 'Second' })).toEqual({ title: 'Second' });
  });
});

describe('an id', () => {
  // RFC 9562, 4: upper case on input is the same UUID, and output is in lower case.
  it('is the same in either case', () => {
    expect(idSchema.parse(id.toUpperCase())).toBe(id);
    const ids = [id, id.toUpperCase()];
    expect(updateReportSchema.safeParse({ verdictIds: ids }).success).toBe(false);
  });
});

describe('a channel', () => {
  it.each([
    ['spectrum', (channel: number) => spectrumQuerySchema.safeParse({ channel })],
    ['waveform', (channel: number) => waveformQuerySchema.safeParse({ channel })],
    ['verdict', (channel: number) => createVerdictSchema.safeParse({ channel, limitSetId: 'x' })],
  ])('of a %s fits the integers of the database', (_, parse) => {
    expect(parse(511).success).toBe(true);
    expect(parse(2 ** 31).success).toBe(false);
  });
});

describe('settings of an analysis', () => {
  const mains = { profile: 'mains', nominalFrequencyHz: 50 } as const;
  const pathOf = (settings: object) =>
    settingsSchema.safeParse({ ...mains, ...settings }).error?.issues[0]?.path.join('.');

  it('keep THD within the orders that are listed, 50 when nothing is said', () => {
    expect(pathOf({ thdMaxOrder: 50 })).toBeUndefined();
    expect(pathOf({ thdMaxOrder: 60 })).toBe('thdMaxOrder');
    expect(pathOf({ thdMaxOrder: 60, maxOrder: 60 })).toBeUndefined();
    expect(pathOf({ thdMaxOrder: 40, maxOrder: 30 })).toBe('thdMaxOrder');
    expect(pathOf({ maxOrder: 30 })).toBeUndefined();
  });

  it('ask for two cycles in a window or more', () => {
    expect(pathOf({ cyclesPerWindow: 1 })).toBe('cyclesPerWindow');
    expect(pathOf({ cyclesPerWindow: 2 })).toBeUndefined();
  });
});

describe('a cursor', () => {
  it('may be as long as the longest name makes it', () => {
    // 160 characters of three UTF-8 bytes each, in base64url.
    const cursor = Buffer.from(JSON.stringify(['電'.repeat(160), id])).toString('base64url');
    expect(pageQuerySchema.parse({ cursor }).cursor).toBe(cursor);
  });
});
