import { AnalysisInputError } from '../errors.js';
import { complexAbs, type Complex } from '../linear/complex.js';
import { stagesOf, type StageChain } from './frequency-response.js';
import type { Root } from './polynomial-roots.js';
import { poles, zeros } from './transfer-function.js';

/** A pole, or a conjugate pair of poles, as the motion that a stage makes by itself. */
export interface NaturalMode {
  /** Of a pair, the pole with positive imaginary part. */
  pole: Complex;
  multiplicity: number;
  /** abs(p)/2π. */
  naturalFrequencyHz: number;
  /** Im p/2π; 0 for a real pole. */
  oscillationFrequencyHz: number;
  /** −Re p/abs(p); null at the origin. Below 0: the mode grows. */
  dampingRatio: number | null;
  /** 1/abs(Re p): of the decay, or of the growth where the damping is negative; null on the imaginary axis. */
  timeConstantS: number | null;
  /** Time after which the envelope e^(Re p t) has fallen to the stated share; null for a mode that does not decay. */
  settlingTimeS: number | null;
}

/**
 * Natural modes of stages in series, the slowest first (Ogata, Modern Control Engineering, 5-3). The settling time is that
 * of the envelope, ln(100/percent) time constants; powers of t that come with repeated poles are left aside.
 *
 * @param settlingPercent what is left of a mode when it counts as settled, default 2
 * @throws AnalysisInputError for a percentage that is not between 0 and 100
 */
export function naturalModes(chain: StageChain, settlingPercent = 2): NaturalMode[] {
  if (!(settlingPercent > 0 && settlingPercent < 100)) {
    throw new AnalysisInputError(
      `The settling band is ${settlingPercent} %; it must lie between 0 and 100 %.`,
    );
  }
  return stagesOf(chain)
    .flatMap((h) => poles(h))
    .filter(({ im }) => im >= 0)
    .map(({ re, im, multiplicity }) => {
      const radius = Math.hypot(re, im);
      const timeConstantS = re === 0 ? null : 1 / Math.abs(re);
      return {
        pole: { re, im },
        multiplicity,
        naturalFrequencyHz: radius / (2 * Math.PI),
        oscillationFrequencyHz: im / (2 * Math.PI),
        dampingRatio: radius === 0 ? null : (0 - re) / radius,
        timeConstantS,
        settlingTimeS: re < 0 ? Math.log(100 / settlingPercent) * timeConstantS! : null,
      };
    })
    .sort((a, b) => b.pole.re - a.pole.re || a.pole.im - b.pole.im);
}

/** A pole that a zero hides from the output. */
export interface HiddenMode {
  pole: Root;
  /** Stage with the pole and stage with the zero, from 0. */
  poleStage: number;
  zeroStage: number;
  /** False: what happens inside does not die away, although the response from input to output shows nothing of it. */
  isStable: boolean;
}

/**
 * Modes that stages in series hide by a zero at, or within a relative distance of, a pole. They still count for stability:
 * a disturbance inside excites them.
 *
 * @param distance as a share of the distance of the pole from the origin
 */
export function hiddenModes(chain: StageChain, distance = 1e-6): HiddenMode[] {
  const stages = stagesOf(chain);
  const free = stages.flatMap((h, stage) => zeros(h).map((zero) => ({ zero, stage })));
  return stages.flatMap((h, poleStage) =>
    poles(h).flatMap((pole) => {
      const reach = distance * complexAbs(pole);
      const at = free.findIndex(({ zero }) => Math.hypot(zero.re - pole.re, zero.im - pole.im) <= reach);
      if (at < 0) return [];
      const zeroStage = free[at]!.stage;
      free.splice(at, 1);
      return [{ pole, poleStage, zeroStage, isStable: pole.re < 0 }];
    }),
  );
}
