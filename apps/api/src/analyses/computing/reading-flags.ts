import type { Flag, ReadWarning } from '@overtally/contracts';
import type { SampleSpan } from './span.js';

/** Places that a flag names one by one. */
const placesNamed = 20;

/** What the reader noticed that a judge of the figures must know, and how much it weighs. */
const severities: Partial<Record<string, Flag['severity']>> = {
  gap: 'warning',
  'uneven-sampling': 'warning',
  'duplicate-rows': 'info',
  'partial-row': 'info',
  truncated: 'info',
};

/**
 * Flags for what the reader noticed of the samples of a span. A warning that names places counts only where one of them
 * lies in the span; they hold for all channels, which share their time.
 */
export function readingFlags(
  warnings: readonly ReadWarning[],
  span: SampleSpan,
  sampleRateHz: number,
): Flag[] {
  return warnings.flatMap((warning) => {
    const severity = severities[warning.code];
    const places = warning.samples?.filter((sample) => span.first < sample && sample <= span.end);
    if (severity === undefined || places?.length === 0) return [];
    const { code, message, samples = [], value = null, limit = null, unit = null } = warning;
    const isWhole = places === undefined || places.length === samples.length;
    const evidence = {
      // Beyond the places that are named, which of them lie in the span is not known.
      count: isWhole ? (warning.count ?? 1) : places.length,
      timesS: (places ?? []).slice(0, placesNamed).map((sample) => (sample - span.first) / sampleRateHz),
      ...{ value, limit, unit },
    };
    return [{ code, severity, message, evidence }];
  });
}

/** Samples of a span, counted from its first, before which time is missing by what the reader noticed. */
export function gapsWithin(warnings: readonly ReadWarning[], { first, end }: SampleSpan): number[] {
  return warnings
    .filter(({ code }) => code === 'gap')
    .flatMap(({ samples = [] }) => samples)
    .filter((sample) => first < sample && sample < end)
    .map((sample) => sample - first);
}
