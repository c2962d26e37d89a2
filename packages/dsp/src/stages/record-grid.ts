import type { ChannelSurvey } from './channel-survey.js';

/** A voltage whose fundamental carries less of its AC power than this is no sound reference. */
const STRONG_SHARE = 0.5;
/** Synchronism tolerance of IEC 61000-4-7, 4.4.1. */
const SYNC_TOLERANCE = 3e-4;
/** Two frequencies differ when they are this many standard deviations apart. */
const DEVIATIONS = 4;

/**
 * The channel whose fundamental sets the windows of all channels of a record: IEC 61000-4-7, 4.4.1 ties the window to the
 * fundamental of the supply, which is best seen in a voltage. Among voltages with a strong fundamental, or else among all
 * channels, the one whose frequency is known best is taken.
 *
 * @returns null when no channel has a fundamental
 */
export function gridChannel(surveys: readonly ChannelSurvey[]): ChannelSurvey | null {
  const periodic = surveys.filter((survey) => survey.fundamental !== null);
  const voltages = periodic.filter(
    (survey) => survey.context.channel.quantity === 'voltage' && shareOfPower(survey) >= STRONG_SHARE,
  );
  const candidates = voltages.length > 0 ? voltages : periodic;
  return candidates.reduce<ChannelSurvey | null>(
    (best, survey) => (best === null || relativeDeviation(survey) < relativeDeviation(best) ? survey : best),
    null,
  );
}

/**
 * Whether a channel has the fundamental of the grid: phases and powers compare channels order by order, so channels of
 * one supply must be taken at one frequency and in the same windows; a channel whose own frequency differs only by noise
 * would otherwise get windows that run away from the others. A channel keeps windows of its own when its fundamental
 * differs by more than the synchronism tolerance of 0.03 % and by more than four standard deviations, since windows of
 * the grid would then not hold whole cycles of it. A channel without a fundamental has nothing to set windows by and
 * follows the grid.
 */
export function followsGrid(survey: ChannelSurvey, grid: ChannelSurvey): boolean {
  if (survey === grid || survey.fundamental === null) return true;
  const [own, its] = [survey.fundamental, grid.fundamental!];
  const noiseHz = Math.hypot(own.estimate.frequencyUncertaintyHz, its.estimate.frequencyUncertaintyHz);
  const limitHz = Math.max(SYNC_TOLERANCE * its.frequencyHz, DEVIATIONS * noiseHz);
  return Math.abs(own.frequencyHz - its.frequencyHz) <= limitHz;
}

function shareOfPower({ fundamental }: ChannelSurvey): number {
  const { fit, residualRms } = fundamental!.estimate;
  const power = fit.components.reduce((sum, component) => sum + component.rms ** 2, residualRms ** 2);
  return fit.components[0]!.rms ** 2 / power;
}

function relativeDeviation({ fundamental }: ChannelSurvey): number {
  return fundamental!.estimate.frequencyUncertaintyHz / fundamental!.frequencyHz;
}
