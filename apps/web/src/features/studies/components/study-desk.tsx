import { Box, chakra, Flex, Heading } from '@chakra-ui/react';
import { memo, useCallback, useMemo, useState, type ReactNode } from 'react';
import type { FourierSeries } from '@overtally/dsp';
import { HarmonicsFigure } from '../charts/harmonics-figure.js';
import { PolesFigure } from '../charts/poles-figure.js';
import { ResponseFigure } from '../charts/response-figure.js';
import { WaveFigure } from '../charts/wave-figure.js';
import { useDraftPart, usePrediction, usePredictionKind, useStudyStore } from '../study-store.js';
import { DelayFigure } from '../charts/delay-figure.js';
import { TransientFigure } from '../charts/transient-figure.js';
import type { DraftStage } from '../draft.js';
import { SpreadContext, type SpreadBand } from '../varying/spread-context.js';
import type { SpreadOutcome } from '../varying/spread-work.js';
import { GoalPart } from './goal-part.js';
import { RebuildPart } from './rebuild-part.js';
import { SpreadPart } from './spread-part.js';
import type { StudyDefinition } from '@overtally/contracts';
import { AssumptionsPart } from './assumptions-part.js';
import { InputPart } from './input-part.js';
import { JudgementPart, type JudgementSlotProps } from './judgement-part.js';
import { Cautions, ResonanceRemarks } from './margin-remarks.js';
import { ResultHead } from './result-head.js';
import { StageList } from './stage-list.js';
import { UnsteadyNotice } from './unsteady-notice.js';
import { Sheet } from '../../../components/sheet.js';

export interface StudySlots {
  channelInput: ReactNode;
  source: ReactNode;
  judgement: (props: JudgementSlotProps) => ReactNode;
  /** Of a saved study with a recording. */
  comparison?: ReactNode;
}

interface StudyDeskProps {
  slots: StudySlots;
  /** An earlier version, or nobody who may write. */
  readOnly: boolean;
}

/** The working page of a study: what goes in and the stages at the side, what comes out beside them. */
export function StudyDesk({ slots, readOnly }: StudyDeskProps) {
  return (
    <Flex direction={{ base: 'column', lg: 'row' }} align="flex-start" columnGap="6">
      <Box w={{ base: 'full', lg: '340px' }} flexShrink="0" minW="0">
        <SidePart title="Input">
          <InputPart disabled={readOnly} channelInput={slots.channelInput} source={slots.source} />
        </SidePart>
        <SidePart title="Stages, from input to output">
          <StageList disabled={readOnly} />
        </SidePart>
        <SidePart title="Judged by">
          <Box pt="3">
            <JudgementPart disabled={readOnly} fields={slots.judgement} />
          </Box>
        </SidePart>
        <SidePart title="Resting on">
          <AssumptionsPart disabled={readOnly} />
        </SidePart>
      </Box>
      <Box flex="1" minW="0" w="full">
        <SpreadResults readOnly={readOnly} />
        {slots.comparison}
      </Box>
    </Flex>
  );
}

/** Results with the spread that was last computed, for as long as nothing changed since. */
function SpreadResults({ readOnly }: { readOnly: boolean }) {
  const store = useStudyStore();
  const stages = useDraftPart((draft) => draft.stages);
  const series = useDraftPart((draft) => draft.series);
  const judgement = useDraftPart((draft) => draft.judgement);
  const [held, setHeld] = useState<HeldSpread | null>(null);
  const keep = useCallback(
    (found: SpreadOutcome) => {
      const { stages: ofStages, series: ofSeries, judgement: by } = store.draft();
      setHeld({ outcome: found, stages: ofStages, series: ofSeries, judgement: by });
    },
    [store],
  );
  const isFresh = held?.stages === stages && held.series === series && held.judgement === judgement;
  const outcome = isFresh ? held.outcome : null;
  const band = useMemo(() => (outcome ? bandOf(outcome) : null), [outcome]);
  return (
    <SpreadContext value={band}>
      <Results readOnly={readOnly} outcome={outcome} onOutcome={keep} />
    </SpreadContext>
  );
}

interface HeldSpread {
  outcome: SpreadOutcome;
  stages: readonly DraftStage[];
  series: FourierSeries;
  judgement: StudyDefinition['judgement'];
}

const bandOf = ({ response, orders }: SpreadOutcome): SpreadBand => ({
  orders,
  response: {
    x: response.map(({ frequencyHz }) => frequencyHz),
    low: response.map(({ minDb }) => minDb),
    high: response.map(({ maxDb }) => maxDb),
  },
});

interface ResultsProps {
  readOnly: boolean;
  outcome: SpreadOutcome | null;
  onOutcome: (outcome: SpreadOutcome) => void;
}

const Results = memo(function Results({ readOnly, outcome, onOutcome }: ResultsProps) {
  const kind = usePredictionKind();
  return (
    <>
      {kind === 'steady' ? (
        <>
          <ResultHead />
          <chakra.aside aria-label="Remarks" mb="4">
            <ResonanceRemarks />
            <Cautions />
          </chakra.aside>
          <HarmonicsFigure />
          <ResponseFigure />
          <WaveFigure />
        </>
      ) : (
        <Refusal />
      )}
      {kind === 'faulty' ? null : <PolesFigure />}
      {kind === 'steady' ? (
        <>
          <TransientFigure />
          <DelayFigure />
          <SpreadPart disabled={readOnly} outcome={outcome} onOutcome={onOutcome} />
          <GoalPart disabled={readOnly} />
          <RebuildPart />
        </>
      ) : null}
    </>
  );
});

/** In place of results, why there are none. */
function Refusal() {
  const prediction = usePrediction();
  if (prediction.kind === 'unsteady') return <UnsteadyNotice facts={prediction.facts} />;
  if (prediction.kind === 'faulty') {
    return (
      <Sheet role="alert" px="4" py="3" mb="4" borderLeftWidth="3px" borderLeftColor="over">
        <Heading as="h2" fontSize="md">
          The stages cannot be computed
        </Heading>
        {prediction.reason}
      </Sheet>
    );
  }
  return null;
}

function SidePart({ title, children }: { title: string; children: ReactNode }) {
  return (
    <chakra.section aria-label={title} mb="6">
      <Heading
        as="h2"
        fontSize="sm"
        lineHeight="1.45"
        pb="2"
        borderBottomWidth="2px"
        borderColor="ink"
        mb="2"
      >
        {title}
      </Heading>
      {children}
    </chakra.section>
  );
}
