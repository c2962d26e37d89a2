import { proposePowerPairs } from '../power/propose-power-pairs.js';
import type { PhaseNumber, ThreePhaseSet } from '../power/types.js';
import type { ChannelDescription, ResolvedSettings } from '../types.js';

/** Which channels make powers. */
export interface PowerSets {
  pairs: readonly { voltage: number; current: number; phase?: PhaseNumber | null | undefined }[];
  threePhase: readonly ThreePhaseSet[];
  /** Indices of all channels in them. */
  channels: ReadonlySet<number>;
}

/**
 * The pairs and three-phase sets of the settings, or what names and quantities propose where they are left out. The tone
 * profile has no powers.
 */
export function powerSets(settings: ResolvedSettings, channels: readonly ChannelDescription[]): PowerSets {
  const asked = settings.pairs !== undefined && settings.threePhase !== undefined;
  const proposed =
    settings.profile === 'tone' || asked ? { pairs: [], threePhase: [] } : proposePowerPairs(channels);
  const pairs = (settings.profile === 'tone' ? undefined : settings.pairs) ?? proposed.pairs;
  const threePhase = (settings.profile === 'tone' ? undefined : settings.threePhase) ?? proposed.threePhase;
  return {
    pairs,
    threePhase,
    channels: new Set([
      ...pairs.flatMap(({ voltage, current }) => [voltage, current]),
      ...threePhase.flatMap((set) => [...set.voltages, ...set.currents]),
    ]),
  };
}
