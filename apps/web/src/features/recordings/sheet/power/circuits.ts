import type { Analysis, PowerPair, ThreePhase } from '@overtally/contracts';

/** What power is shown of: a voltage with its current, or three phases. */
export type Circuit = {
  key: string;
  name: string;
  channels: readonly number[];
} & (
  { kind: 'pair'; pair: PowerPair } | { kind: 'three-phase'; set: ThreePhase; phaseNames: readonly string[] }
);

/** Three-phase sets first, then the pairs, named by their channels. */
export function circuitsOf({
  channels,
  power,
  threePhase,
}: Pick<Analysis, 'channels' | 'power' | 'threePhase'>): Circuit[] {
  const names = new Map(channels.map(({ index, name }) => [index, name]));
  const nameOf = (index: number) => names.get(index) ?? `channel ${index + 1}`;
  const withCurrent = (voltage: number, current: number) => `${nameOf(voltage)} with ${nameOf(current)}`;
  return [
    ...threePhase.map((set): Circuit => {
      const all = [...set.voltageChannels, ...set.currentChannels];
      return {
        kind: 'three-phase',
        key: `three-phase-${set.voltageChannels.join('-')}`,
        name: `${set.voltageChannels.map(nameOf).join(', ')} with ${set.currentChannels.map(nameOf).join(', ')}`,
        channels: all,
        set,
        phaseNames: set.voltageChannels.map((voltage, i) =>
          withCurrent(voltage, set.currentChannels[i] ?? 0),
        ),
      };
    }),
    ...power.map((pair): Circuit => ({
      kind: 'pair',
      key: `${pair.voltageChannel}-${pair.currentChannel}`,
      name: withCurrent(pair.voltageChannel, pair.currentChannel),
      channels: [pair.voltageChannel, pair.currentChannel],
      pair,
    })),
  ];
}
