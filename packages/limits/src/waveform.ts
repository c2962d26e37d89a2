import type { TotalVerdict, WaveformCondition } from '@overtally/contracts';
import type { CurrentShape } from './measurement.js';

const degrees = (angle: number): string => `${Number(angle.toFixed(1))}°`;

/** Shape of a lamp's current against the condition of IEC 61000-3-2 for lighting of up to 25 W (7.3 b, 7.4.3). */
export function judgeWaveform(condition: WaveformCondition, shape: CurrentShape | null): TotalVerdict {
  const { startsByDeg, peakByDeg, endsNotBeforeDeg } = condition;
  const row = { name: 'Current shape', value: null, unit: '', limit: null, sharePercent: null };
  const wanted = `starts at or before ${startsByDeg}°, last peak at or before ${peakByDeg}°, ends not before ${endsNotBeforeDeg}°`;
  if (shape === null) {
    const reason = `The shape of the current against the voltage is not known here (${wanted})`;
    return { ...row, result: 'not-decidable', reason };
  }
  const missed = [
    shape.startsDeg > startsByDeg ? `starts at ${degrees(shape.startsDeg)}` : null,
    shape.peakDeg > peakByDeg ? `peaks at ${degrees(shape.peakDeg)}` : null,
    shape.endsDeg < endsNotBeforeDeg ? `ends at ${degrees(shape.endsDeg)}` : null,
  ].filter((part) => part !== null);
  if (missed.length === 0) {
    const angles = `starts at ${degrees(shape.startsDeg)}, has its last peak at ${degrees(shape.peakDeg)} and ends at ${degrees(shape.endsDeg)}`;
    return { ...row, result: 'pass', reason: `The current ${angles}` };
  }
  return { ...row, result: 'fail', reason: `The current ${missed.join(', ')} (asked for: ${wanted})` };
}
