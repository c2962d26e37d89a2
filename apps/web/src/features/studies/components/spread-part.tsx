import { Box, Button, Flex, Text } from '@chakra-ui/react';
import type { StudyDefinition } from '@overtally/contracts';
import { FoldingFigure } from '../../../components/folding-figure.js';
import { NumberInput } from '../../../components/number-input.js';
import { Segmented } from '../../../components/segmented.js';
import { TableTwin } from '../../../components/table-twin.js';
import { formatPercent, formatSi } from '../../../lib/format.js';
import { specOf, stagesOn } from '../draft.js';
import { bodeFrequencies } from '../predict.js';
import { useDraftPart, useLateStages, useStudyStore } from '../study-store.js';
import type { SpreadOutcome } from '../varying/spread-work.js';
import { useStudyWork } from '../varying/use-study-work.js';
import { spreadPlaces } from '../varying/variable-values.js';
import { ToleranceFields } from './tolerance-fields.js';
import { WorkProgress } from './work-progress.js';

type Settings = NonNullable<StudyDefinition['spread']>;

const methods = [
  { value: 'corners', label: 'Corners' },
  { value: 'draws', label: 'Random draws' },
] as const;

interface SpreadPartProps {
  disabled: boolean;
  /** The outcome that the charts show; null once stages or input changed. */
  outcome: SpreadOutcome | null;
  onOutcome: (outcome: SpreadOutcome) => void;
}

/** Tolerances of the values, and what they do to the output. */
export function SpreadPart({ disabled, outcome, onOutcome }: SpreadPartProps) {
  return (
    <FoldingFigure
      title="Tolerances"
      subtitle={outcome ? outcomeLine(outcome) : 'What the spread of the values does to the output'}
      table={outcome ? <OutcomeTable outcome={outcome} /> : undefined}
    >
      <SpreadForm disabled={disabled} outcome={outcome} onOutcome={onOutcome} />
    </FoldingFigure>
  );
}

function SpreadForm({ disabled, outcome, onOutcome }: SpreadPartProps) {
  const store = useStudyStore();
  const stages = useLateStages();
  const spread = useDraftPart((draft) => draft.spread);
  const settings: Settings = spread ?? { method: 'draws', draws: 1000, seed: 1 };
  const { state, run, cancel } = useStudyWork<SpreadOutcome>(onOutcome);
  const set = (change: Partial<Settings>) =>
    store.change((draft) => ({ ...draft, spread: { ...settings, ...change } }));
  const places = spreadPlaces(stages);
  const start = () => {
    const draft = store.draft();
    run({
      kind: 'spread',
      specs: stagesOn(draft.stages).map(({ stage }) => specOf(stage)),
      places,
      series: draft.series,
      frequenciesHz: bodeFrequencies(draft.series).filter((_, i) => i % 3 === 0),
      settings,
      limitSet: store.limitSet(),
      judgement: draft.judgement,
      output: { quantity: draft.outputQuantity, unit: draft.outputUnit },
    });
  };
  return (
    <Box>
      <ToleranceFields disabled={disabled} />
      <Flex gap="4" align="center" wrap="wrap" mt="3" fontSize="13px">
        <Segmented
          label="How the values are spread"
          value={settings.method}
          options={methods}
          onChange={(method) => set({ method })}
        />
        {settings.method === 'draws' ? (
          <>
            <label>
              Draws{' '}
              <NumberInput
                size="xs"
                width="20"
                value={settings.draws}
                min={10}
                max={20_000}
                onChange={(draws) => set({ draws: Math.round(draws) })}
              />
            </label>
            <label>
              Seed{' '}
              <NumberInput
                size="xs"
                width="24"
                value={settings.seed}
                min={0}
                max={0xffffffff}
                onChange={(seed) => set({ seed: Math.round(seed) })}
              />
            </label>
          </>
        ) : null}
        <Button disabled={places.length === 0 || state.kind === 'running'} onClick={start}>
          Compute the spread
        </Button>
      </Flex>
      {places.length === 0 ? (
        <Text fontSize="13px" color="inkSoft" mt="2">
          Give at least one value a tolerance.
        </Text>
      ) : null}
      <WorkProgress label="Spread of the values" state={state} onCancel={cancel} />
      {outcome ? (
        <OutcomeWords outcome={outcome} />
      ) : state.kind === 'done' ? (
        <Text fontSize="13px" color="near" mt="2">
          Stages, input or limits changed since; compute the spread again.
        </Text>
      ) : null}
    </Box>
  );
}

const share = ({ passing, trials }: SpreadOutcome) => formatPercent((100 * (passing ?? 0)) / trials);

const outcomeLine = (outcome: SpreadOutcome) =>
  outcome.passing === null
    ? `${outcome.trials} trials`
    : `${share(outcome)} of ${outcome.trials} trials pass`;

function OutcomeWords({ outcome }: { outcome: SpreadOutcome }) {
  const { method, seed, trials, passing, unsteady, worst } = outcome;
  return (
    <Text fontSize="13px" mt="2" role="status">
      {method === 'corners'
        ? `All ${trials} corners of the tolerances. `
        : `${trials} draws with seed ${seed}; the same seed gives the same draws. `}
      {passing === null ? 'Nothing is judged. ' : `${passing} pass, ${share(outcome)}. `}
      {worst
        ? `Worst is order ${worst.order}, at ${formatPercent(worst.sharePercent)} of its limit at most. `
        : ''}
      {unsteady > 0 ? `${unsteady} have no steady state and count as not passing. ` : ''}
      {method === 'corners'
        ? 'An extreme between the ends of a tolerance, as with a resonance that passes an order, shows in draws only.'
        : ''}
    </Text>
  );
}

function OutcomeTable({ outcome }: { outcome: SpreadOutcome }) {
  const unit = useDraftPart((draft) => draft.outputUnit);
  const column = (key: 'nominal' | 'min' | 'max', header: string) => ({
    key,
    header,
    fileHeader: unit ? `${header} (${unit})` : header,
    align: 'right' as const,
    value: (row: SpreadOutcome['orders'][number]) => row[key],
    show: (row: SpreadOutcome['orders'][number]) => formatSi(row[key], unit),
  });
  return (
    <TableTwin
      caption="Spread of the orders over the tolerances"
      columns={[
        { key: 'order', header: 'Order', fileHeader: 'Order', align: 'right', value: (row) => row.order },
        column('nominal', 'Nominal'),
        column('min', 'Smallest'),
        column('max', 'Largest'),
      ]}
      rows={outcome.orders}
      rowKey={(row) => row.order}
      fileName="spread-of-orders"
      maxHeight="320px"
    />
  );
}
