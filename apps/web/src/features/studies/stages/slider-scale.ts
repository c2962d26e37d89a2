/** Range and spacing of a slider; positions are whole numbers from 0 to `steps`. */
export interface SliderScale {
  scale: 'logarithmic' | 'linear';
  from: number;
  to: number;
  steps: number;
}

const LOG_STEPS = 300;
const LINEAR_STEPS = 200;

/**
 * Range of a slider about a value: for positive ones three decades on a logarithmic scale, from the decade below that of
 * the value to two above, in steps of 2.3 %; for others from 0, or from −2 to 2 times the value.
 */
export function scaleAbout(value: number, isPositive: boolean): SliderScale {
  if (value > 0 && isPositive) {
    const decade = Math.floor(Math.log10(value) + 1e-9);
    return {
      scale: 'logarithmic',
      from: Number(`1e${decade - 1}`),
      to: Number(`1e${decade + 2}`),
      steps: LOG_STEPS,
    };
  }
  const reach = value === 0 ? 1 : 2 * Math.abs(value);
  return { scale: 'linear', from: value < 0 || !isPositive ? -reach : 0, to: reach, steps: LINEAR_STEPS };
}

export const isWithin = (value: number, { from, to }: SliderScale): boolean => value >= from && value <= to;

export function valueAt(position: number, { scale, from, to, steps }: SliderScale): number {
  const share = position / steps;
  const value = scale === 'logarithmic' ? from * (to / from) ** share : from + (to - from) * share;
  return Number(value.toPrecision(4));
}

export function positionOf(value: number, { scale, from, to, steps }: SliderScale): number {
  const share =
    scale === 'logarithmic' ? Math.log(value / from) / Math.log(to / from) : (value - from) / (to - from);
  return Math.round(steps * Math.min(1, Math.max(0, share)));
}
