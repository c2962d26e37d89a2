import type { ReadProblem, Settings } from '@overtally/contracts';

/** A record and the settings that may choose a part of it. */
export interface SpanInput {
  settings: Settings;
  sampleRateHz: number;
  sampleCount: number;
}

/** Samples `first` up to but not including `end` of a record. */
export interface SampleSpan {
  first: number;
  end: number;
}

/** The span of the settings in samples, cut to the record. */
export function spanInSamples({ settings: { span }, sampleRateHz, sampleCount }: SpanInput): SampleSpan {
  if (span === undefined) return { first: 0, end: sampleCount };
  return {
    first: Math.min(sampleCount, Math.round(span.fromS * sampleRateHz)),
    end: Math.min(sampleCount, Math.round(span.toS * sampleRateHz)),
  };
}

/** What is wrong with a span of fewer than 2 samples. */
export function spanProblem({ settings: { span }, sampleRateHz, sampleCount }: SpanInput): ReadProblem {
  const duration = `${sampleCount / sampleRateHz} s`;
  return span === undefined
    ? {
        code: 'record-too-short',
        message: `The record holds ${sampleCount} ${sampleCount === 1 ? 'sample' : 'samples'}; an analysis needs at least 2.`,
        cure: 'Capture a longer record; for the mains profile at least 10 cycles.',
      }
    : {
        code: 'span-outside-record',
        message: `From ${span.fromS} s to ${span.toS} s the record of ${duration} holds fewer than 2 samples.`,
        cure: `Choose a span within 0 s and ${duration}.`,
      };
}
