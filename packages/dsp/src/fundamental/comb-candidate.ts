import type { SpectralPeak } from './spectral-peaks.js';

const LOWEST_HZ = 1;
const STRONG_PEAKS = 8;
const MAX_DIVISOR = 16;
const TOLERANCE_LINES = 0.7;
/** Share of the summed peak amplitudes that a higher candidate may leave unexplained against the best one. */
const ALLOWED_LOSS = 0.03;

/**
 * Chooses the fundamental from a list of spectral peaks by comb reasoning: every strong peak divided by 1..16 is a
 * candidate; its score is the summed amplitude of the peaks that fall on its multiples. Any subharmonic of the true
 * value scores as high, a strong harmonic scores less, so the highest candidate near the best score is taken.
 *
 * @param lineHz spacing of the spectrum lines, for the tolerance of a match
 */
export function combCandidate(peaks: readonly SpectralPeak[], lineHz: number): number | null {
  const total = peaks.reduce((sum, p) => sum + p.amplitude, 0);
  const candidates: { frequencyHz: number; score: number }[] = [];
  for (const peak of peaks.slice(0, STRONG_PEAKS)) {
    for (let divisor = 1; divisor <= MAX_DIVISOR; divisor++) {
      const frequencyHz = peak.frequencyHz / divisor;
      if (frequencyHz < LOWEST_HZ || frequencyHz < 2 * lineHz) break;
      candidates.push({ frequencyHz, score: combScore(peaks, frequencyHz, lineHz) });
    }
  }
  if (candidates.length === 0) return null;
  const best = Math.max(...candidates.map((c) => c.score));
  const good = candidates.filter((c) => c.score >= best - ALLOWED_LOSS * total);
  return Math.max(...good.map((c) => c.frequencyHz));
}

function combScore(peaks: readonly SpectralPeak[], frequencyHz: number, lineHz: number): number {
  const tolerance = Math.min(TOLERANCE_LINES * lineHz, 0.1 * frequencyHz);
  let score = 0;
  for (const peak of peaks) {
    const order = Math.round(peak.frequencyHz / frequencyHz);
    if (order >= 1 && Math.abs(peak.frequencyHz - order * frequencyHz) <= tolerance) score += peak.amplitude;
  }
  return score;
}
