import { Button } from '@chakra-ui/react';
import { useState } from 'react';
import { MarginColumn, MarginLayout } from '../../../components/margin-column.js';
import { clampSpan, firstView, type Span } from '../charts/span.js';
import { isBusy } from '../recording-status.js';
import { MainsCaution } from './mains-caution.js';
import { ChannelChooser } from './channel-chooser.js';
import { WarningItems } from './flags/flag-items.js';
import type { RecordingSheetProps } from './recording-sheet.js';
import { AnalyseDialog } from './settings/analyse-dialog.js';
import { SheetTitleBlock } from './sheet-title-block.js';
import { TimeFigure } from './time-figure.js';

/** A recording without a finished analysis: its waveform when it was read, and the way to an analysis. */
export function UnanalysedSheet({
  recording,
  project,
  place,
  channel: index,
  mayRun,
}: RecordingSheetProps & { channel: number; mayRun: boolean }) {
  const [chosen, setView] = useState<Span | null>(null);
  const [asking, setAsking] = useState(false);
  const channel = recording.channels.find((candidate) => candidate.index === index);
  const view = chosen ?? firstView(recording.durationS ?? 0, null);
  const [markS, setMarkS] = useState<number | null>(null);
  const showTime = (timeS: number) => {
    const half = (view.toS - view.fromS) / 2;
    setView(clampSpan({ fromS: timeS - half, toS: timeS + half }, recording.durationS ?? 0, 0));
    setMarkS(timeS);
  };
  const block = <SheetTitleBlock recording={recording} channel={null} set={null} comparison={null} />;
  const wasRead = recording.status !== 'received' && recording.status !== 'reading';
  if (!channel || !wasRead) return block;
  return (
    <>
      {block}
      <ChannelChooser
        channels={recording.channels}
        value={index}
        onChange={place.onChannel}
        actions={
          mayRun && !isBusy(recording) ? (
            <Button variant="solid" onClick={() => setAsking(true)}>
              Analyse
            </Button>
          ) : undefined
        }
      />
      <MarginLayout
        margin={
          <MarginColumn title="Margin">
            <WarningItems
              warnings={recording.warnings}
              sampleRateHz={recording.sampleRateHz}
              onTime={showTime}
            />
            <MainsCaution />
          </MarginColumn>
        }
      >
        <TimeFigure
          recording={recording}
          channel={channel}
          figures={null}
          view={view}
          onView={setView}
          markS={markS}
        />
      </MarginLayout>
      <AnalyseDialog
        recording={recording}
        settings={project.defaultSettings}
        view={view}
        open={asking}
        onClose={() => setAsking(false)}
      />
    </>
  );
}
