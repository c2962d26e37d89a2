import { windowSums } from '../windows/window-gains.js';
import { windowSamples, type WindowName } from '../windows/window-samples.js';
import { createSegmentPower } from './segment-power.js';

export interface WelchOptions {
  window: WindowName;
  /** Kaiser only. */
  kaiserBeta?: number | undefined;
  segmentLength: number;
  /** Samples that neighbouring segments share, 0 to segmentLength − 1. */
  overlapSamples: number;
  /** `mean` takes the mean of each segment away; `none` keeps DC. */
  detrend: 'mean' | 'none';
  /** `density`: unit²/Hz, right for noise; `spectrum`: unit² per line, right for steady tones. */
  scaling: 'density' | 'spectrum';
}

export interface PowerSpectrum {
  /** Spacing of the lines; the first is DC, the last at or just below half the sample rate. */
  stepHz: number;
  /** One-sided mean power per line, unit²/Hz or unit². */
  power: Float64Array;
  scaling: 'density' | 'spectrum';
  /** Segments averaged. */
  segments: number;
  /** Equivalent noise bandwidth of a line: spectrum = density × noiseBandwidthHz. */
  noiseBandwidthHz: number;
}

/** A Welch average that takes its record in blocks; its memory does not grow with the record. */
export interface WelchAverage {
  /** Takes the next samples, any number of them. */
  push(block: Float64Array): void;
  /** The average so far; null before the first whole segment. */
  finish(): PowerSpectrum | null;
}

/**
 * Power spectrum by averaged windowed periodograms (P. D. Welch, IEEE Trans. AU-15, 1967): segments from the first
 * sample, arithmetic mean, a last incomplete segment dropped, one-sided (DC and the line at half the sample rate are not
 * doubled), scaled by Σw² (density) or (Σw)² (spectrum) as in Heinzel, Rüdiger, Schilling 2002, section 9. A record
 * shorter than one segment is taken as one segment.
 *
 * @throws RangeError when segment length or overlap make no sense
 */
export function welch(samples: Float64Array, sampleRateHz: number, options: WelchOptions): PowerSpectrum {
  const segmentLength = Math.min(options.segmentLength, samples.length);
  const overlapSamples = Math.min(options.overlapSamples, segmentLength - 1);
  const average = createWelch(sampleRateHz, { ...options, segmentLength, overlapSamples });
  average.push(samples);
  return average.finish()!;
}

/** As `welch`, for a record that comes in blocks. Blocks need not hold whole segments. */
export function createWelch(sampleRateHz: number, options: WelchOptions): WelchAverage {
  const { segmentLength, overlapSamples, scaling } = options;
  requireSegment(segmentLength, overlapSamples);
  const window = windowSamples(options.window, segmentLength, options.kaiserBeta);
  const periodograms = createSegmentPower(window, options.detrend === 'mean');
  const hop = segmentLength - overlapSamples;
  const pending = new Float64Array(segmentLength);
  let held = 0;
  let segments = 0;

  function add(source: Float64Array, start: number): void {
    periodograms.add(source, start);
    segments++;
  }

  /** Adds what begins at `start` of the block and keeps the samples after the last whole segment. */
  function addFromBlock(block: Float64Array, start: number): void {
    let at = start;
    for (; at + segmentLength <= block.length; at += hop) add(block, at);
    pending.set(block.subarray(at));
    held = block.length - at;
  }

  return {
    push(block) {
      let at = 0;
      // What is held are the `held` samples before `at`, until all of them lie in this block.
      while (at < held) {
        const taken = Math.min(segmentLength - held, block.length - at);
        pending.set(block.subarray(at, at + taken), held);
        at += taken;
        held += taken;
        if (held < segmentLength) return;
        add(pending, 0);
        pending.copyWithin(0, hop);
        held = segmentLength - hop;
      }
      addFromBlock(block, at - held);
    },
    finish() {
      if (segments === 0) return null;
      const { sum, squares } = windowSums(window);
      const stepHz = sampleRateHz / segmentLength;
      const noiseBandwidthHz = (sampleRateHz * squares) / (sum * sum);
      const scale = 1 / (segments * (scaling === 'density' ? sampleRateHz * squares : sum * sum));
      const power = periodograms.sum.map((value, k) => {
        const single = k === 0 || 2 * k === segmentLength;
        return (single ? 1 : 2) * value * scale;
      });
      return { stepHz, power, scaling, segments, noiseBandwidthHz };
    },
  };
}

function requireSegment(segmentLength: number, overlapSamples: number): void {
  if (!Number.isInteger(segmentLength) || segmentLength < 1) {
    throw new RangeError(`Segments must hold a positive whole number of samples, got ${segmentLength}`);
  }
  if (!Number.isInteger(overlapSamples) || overlapSamples < 0 || overlapSamples >= segmentLength) {
    throw new RangeError(`The overlap must be 0 to ${segmentLength - 1} samples, got ${overlapSamples}`);
  }
}
