/**
 * Standard uncertainty of an rms value that an unknown phasor of mean square `power` was added to: its part in phase
 * changes the value by √(power/2) either way, and its power raises it by up to `riseOf(value, power)`.
 */
export function disturbance(value: number, power: number): number {
  return Math.sqrt(power / 2 + riseOf(value, power) ** 2);
}

/**
 * How much of an rms value can be power that was added to it, as a standard uncertainty: the true value lies between
 * √(value² − power) (0 where the power exceeds it) and the value, anywhere alike (rectangular, JCGM 100:2008, 4.3.7;
 * the rise is not corrected for, F.2.4.5, so the full width counts: width/√3).
 */
export function riseOf(value: number, power: number): number {
  const least = Math.sqrt(Math.max(0, value ** 2 - power));
  return (value - least) / Math.sqrt(3);
}
