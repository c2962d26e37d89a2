import type { InstrumentRef, ReportCaution, ReportContent, ReportSection } from '@overtally/contracts';

/**
 * What who reviews and issues a report should know of it, section by section.
 * @param outdated verdicts whose recording was read or scaled anew since, with words on it
 */
export function cautionsOf(
  content: ReportContent,
  outdated: readonly { id: string; message: string }[],
): ReportCaution[] {
  return content.sections.flatMap((each, section) => [
    ...outdated
      .filter(({ id }) => id === each.verdict.id)
      .map(({ message }) => ({ code: 'verdict-outdated' as const, section, message })),
    ...calibrationCautions(each).map((caution) => ({ ...caution, section })),
  ]);
}

function calibrationCautions({ chain, recording }: ReportSection): Omit<ReportCaution, 'section'>[] {
  if (!chain) {
    const message = `${recording.number} names no measuring chain, so nothing tells its calibration; name the chain on the recording's sheet`;
    return [{ code: 'chain-not-named', message }];
  }
  return chain.instruments
    .filter(({ calibrationState }) => calibrationState !== 'valid')
    .map((instrument) => ({
      code: 'calibration-overdue',
      message: `${instrumentName(instrument)}, used for ${recording.number}: ${calibrationWords(instrument)}`,
    }));
}

const instrumentName = ({ name, serialNumber }: InstrumentRef): string => `${name}, no. ${serialNumber}`;

const calibrationWords = ({ calibration }: InstrumentRef): string =>
  calibration
    ? `calibration was due on ${calibration.dueOn}, before the capture`
    : 'no calibration before the capture is on record';
