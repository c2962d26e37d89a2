import type { FourierSeries } from '../fourier/types.js';
import { angleDegrees, complexAbs } from '../linear/complex.js';
import { wrapDegrees } from '../model/fit-sinusoids.js';
import { responseAt } from './frequency-response.js';
import { stability, type StabilityVerdict } from './stability.js';
import type { TransferFunction } from './transfer-function.js';

/** The periodic signal behind a stage, or why there is none. */
export type SteadyState =
  | { isDefined: true; series: FourierSeries }
  | { isDefined: false; verdict: StabilityVerdict; reason: string };

/**
 * What a stage makes of a periodic signal once all transients have died away: every phasor X_h becomes H(jhω) X_h, DC is
 * multiplied with H(0). Only a stable stage has such a state; `restRms`, of unknown frequency, does not pass on.
 */
export function steadyStateOf(series: FourierSeries, h: TransferFunction): SteadyState {
  const { verdict, reason } = stability(h);
  if (verdict !== 'stable') {
    return {
      isDefined: false,
      verdict,
      reason: `There is no steady state: the stage is ${verdict}. ${reason}`,
    };
  }
  // A stable stage has no pole on the imaginary axis, so the response is finite everywhere on it.
  return {
    isDefined: true,
    series: {
      frequencyHz: series.frequencyHz,
      dc: series.dc * responseAt(h, 0)!.re,
      components: series.components.map(({ order, rms, phaseDeg }) => {
        const factor = responseAt(h, order * series.frequencyHz)!;
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
