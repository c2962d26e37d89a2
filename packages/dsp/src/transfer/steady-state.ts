import type { FourierSeries } from '../fourier/types.js';
import { angleDegrees, complexAbs } from '../linear/complex.js';
import { wrapDegrees } from '../model/fit-sinusoids.js';
import { responseOf, type StageChain } from './frequency-response.js';
import { stability } from './stability.js';
import type { StabilityVerdict } from './transfer-function.js';

/** The periodic signal behind a stage, or why there is none. */
export type SteadyState =
  | { isDefined: true; series: FourierSeries }
  | { isDefined: false; verdict: StabilityVerdict; reason: string };

/**
 * What a stage, or stages in series, make of a periodic signal once all transients have died away: every phasor X_h becomes
 * H(jhω) X_h, DC is multiplied with H(0). Only stable stages have such a state; `restRms`, of unknown frequency, does not
 * pass on.
 */
export function steadyStateOf(series: FourierSeries, chain: StageChain): SteadyState {
  const { verdict, reason } = stability(chain);
  if (verdict !== 'stable') {
    const subject = 'numerator' in chain || chain.length === 1 ? 'the stage is' : 'the stages are';
    return {
      isDefined: false,
      verdict,
      reason: `There is no steady state: ${subject} ${verdict}. ${reason}`,
    };
  }
  // A stable stage has no pole on the imaginary axis, so the response is finite everywhere on it.
  const response = responseOf(chain);
  return {
    isDefined: true,
    series: {
      frequencyHz: series.frequencyHz,
      dc: series.dc * response(0)!.re,
      components: series.components.map(({ order, rms, phaseDeg }) => {
        const factor = response(order * series.frequencyHz)!;
        const gain = complexAbs(factor);
        return {
          order,
          rms: gain * rms,
          phaseDeg: phaseDeg === null || gain === 0 ? null : wrapDegrees(phaseDeg + angleDegrees(factor)),
        };
      }),
    },
  };
}
