import type { Analysis, ChannelAnalysis } from '@overtally/contracts';

/** The voltage that goes with a current: that of its power, else the only voltage of the recording. */
export function voltageBeside(
  { power, channels }: Pick<Analysis, 'power' | 'channels'>,
  currentChannel: number,
): ChannelAnalysis | undefined {
  const pair = power.find((each) => each.currentChannel === currentChannel);
  const voltages = channels.filter(({ quantity }) => quantity === 'voltage');
  if (pair) return voltages.find(({ index }) => index === pair.voltageChannel);
  return voltages.length === 1 ? voltages[0] : undefined;
}
