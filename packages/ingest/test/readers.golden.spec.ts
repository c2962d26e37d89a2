import { describe, expect, it } from 'vitest';
import { fixture, readAll } from './support.js';

/** One expected quantity of a reference case; which members it has follows from `kind`. */
interface Expected {
  kind: 'text' | 'one_of' | 'integer' | 'number' | 'array' | 'flags' | 'mention';
  value: unknown;
  values?: string[];
  tol_abs?: number;
  tol_rel?: number;
  must?: (string | string[])[];
  must_not?: string[];
  groups?: string[][];
  when?: Record<string, string>;
}

interface Case {
  id: string;
  title: string;
  files: { name: string }[];
  expected: Record<string, Expected>;
}

const { cases } = JSON.parse(new TextDecoder().decode(fixture('cases.json'))) as { cases: Case[] };

async function result(name: string): Promise<Record<string, unknown>> {
  const { outcome, samples } = await readAll(fixture(name), {}, name);
  if (!outcome.ok) {
    const { code, message } = outcome.problem;
    return { outcome: code === 'needs-sample-rate' ? code : 'refused', message };
  }
  return {
    outcome: 'accepted',
    sample_rate_hz: outcome.sampleRateHz,
    channels: outcome.channels.length,
    samples: outcome.sampleCount,
    first: samples.map((values) => values[0]),
    last: samples.map((values) => values.at(-1)),
    warnings: outcome.warnings.map(({ code }) => code),
    missing_values: outcome.missingValues.reduce((sum, n) => sum + n, 0),
  };
}

function close(wanted: number, got: unknown, e: Expected): void {
  expect(got).toBeTypeOf('number');
  const tolerance = Math.max(e.tol_abs ?? 0, (e.tol_rel ?? 0) * Math.abs(wanted));
  expect(Math.abs((got as number) - wanted)).toBeLessThanOrEqual(tolerance);
}

function judge(e: Expected, got: unknown): void {
  if (e.kind === 'number') close(e.value as number, got, e);
  else if (e.kind === 'array') {
    const wanted = e.value as number[];
    expect(got).toHaveLength(wanted.length);
    wanted.forEach((value, i) => close(value, (got as unknown[])[i], e));
  } else if (e.kind === 'one_of') expect(e.values).toContain(got);
  else if (e.kind === 'flags') {
    const names = got as string[];
    for (const name of e.must ?? []) expect([name].flat().some((one) => names.includes(one))).toBe(true);
    for (const name of e.must_not ?? []) expect(names).not.toContain(name);
  } else if (e.kind === 'mention') {
    const message = (got as string).toLowerCase();
    for (const group of e.groups ?? [])
      expect(
        group.some((word) => message.includes(word.toLowerCase())),
        message,
      ).toBe(true);
  } else expect(got).toEqual(e.value);
}

// Expected values: fixtures/readers/SOURCE.md.
describe('files as instruments write them', () => {
  it.each(cases.map((one) => [one.id, one.title, one] as const))('%s %s', async (_id, _title, one) => {
    const got = await result((one.files[0] as { name: string }).name);
    for (const [quantity, e] of Object.entries(one.expected)) {
      const applies = Object.entries(e.when ?? {}).every(([name, value]) => got[name] === value);
      if (applies) judge(e, got[quantity]);
    }
  });
});
