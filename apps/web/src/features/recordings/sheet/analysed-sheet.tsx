import { Button } from '@chakra-ui/react';
import type { Analysis, ChannelAnalysis } from '@overtally/contracts';
import { useState } from 'react';
import { ErrorState } from '../../../components/error-state.js';
import { isBusy } from '../recording-status.js';
import { ChannelFigures } from './channel-figures.js';
import { ComparisonChooser } from './comparison-chooser.js';
import { hasPower, PartRow } from './part-row.js';
import { PowerView } from './power/power-view.js';
import type { RecordingSheetProps } from './recording-sheet.js';
import { AnalyseDialog } from './settings/analyse-dialog.js';
import { SheetTitleBlock } from './sheet-title-block.js';
import { useComparison } from './use-comparison.js';
import { useSheetState } from './use-sheet-state.js';

export interface AnalysedSheetProps extends RecordingSheetProps {
  analysis: Analysis;
  channel: number;
  mayRun: boolean;
}

/** Title block, figures and margin of a finished analysis. */
export function AnalysedSheet(props: AnalysedSheetProps) {
  const channel = props.analysis.channels.find(({ index }) => index === props.channel);
  if (!channel) return <ErrorState error={new Error('This analysis has no channel.')} />;
  return <ChannelSheet {...props} figures={channel} />;
}

function ChannelSheet(props: AnalysedSheetProps & { figures: ChannelAnalysis }) {
  const { analysis, figures, recording, project, limitSets, place, mayRun } = props;
  const { sets, set, comparison, choose } = useComparison(figures, project, limitSets);
  const [asking, setAsking] = useState(false);
  const part = hasPower(analysis) ? place.part : 'channel';
  const state = useSheetState(figures, recording, place.onChannel);
  return (
    <>
      <SheetTitleBlock recording={recording} channel={figures} set={set} comparison={comparison} />
      <PartRow
        analysis={analysis}
        channel={figures.index}
        part={part}
        onPart={place.onPart}
        onChannel={state.changeChannel}
        actions={
          <>
            {part === 'channel' ? (
              <ComparisonChooser sets={sets} value={set?.id ?? ''} onChange={choose} />
            ) : null}
            {mayRun ? (
              <Button disabled={isBusy(recording)} onClick={() => setAsking(true)}>
                Analyse again
              </Button>
            ) : null}
          </>
        }
      />
      {part === 'power' ? (
        <PowerView recording={recording} analysis={analysis} onChannel={state.changeChannel} />
      ) : (
        <ChannelFigures {...props} state={state} set={set} comparison={comparison} />
      )}
      <AnalyseDialog
        recording={recording}
        settings={analysis.settings}
        view={state.view}
        open={asking}
        onClose={() => setAsking(false)}
      />
    </>
  );
}
