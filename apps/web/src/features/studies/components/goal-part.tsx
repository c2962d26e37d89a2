import { Box, Button, Flex, Text } from '@chakra-ui/react';
import { useState } from 'react';
import { FoldingFigure } from '../../../components/folding-figure.js';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { notifyDone } from '../../../components/notify.js';
import { NumberInput } from '../../../components/number-input.js';
import { formatPercent } from '../../../lib/format.js';
import { specOf, stagesOn } from '../draft.js';
import { valueText } from '../stages/value-text.js';
import { useDraftPart, useLateStages, useStudyStore } from '../study-store.js';
import type { Goal, GoalOutcome } from '../varying/goal-work.js';
import { useStudyWork } from '../varying/use-study-work.js';
import { variableValues, type VariableValue } from '../varying/variable-values.js';
import { RangeEnd } from './range-end.js';
import { WorkProgress } from './work-progress.js';

const goals = [
  { value: 'verdict', label: 'The verdict passes with a margin' },
  { value: 'thd', label: 'THD is at most' },
];

/** The smallest value of a component with which the output meets a goal. */
export function GoalPart({ disabled }: { disabled: boolean }) {
  return (
    <FoldingFigure
      title="Smallest value for a goal"
      subtitle="Searches a range of one value for the first that does"
    >
      <GoalForm disabled={disabled} />
    </FoldingFigure>
  );
}

const keyOf = ({ stage, parameter }: VariableValue) => `${stage} ${parameter.name}`;

function GoalForm({ disabled }: { disabled: boolean }) {
  const store = useStudyStore();
  const stages = useLateStages();
  const hasLimits = useDraftPart((draft) => draft.judgement !== null);
  const values = variableValues(stages);
  const [chosen, setChosen] = useState('');
  const [range, setRange] = useState<{ of: string; from: number; to: number } | null>(null);
  const [goal, setGoal] = useState<Goal>(
    hasLimits ? { kind: 'verdict', marginPercent: 10 } : { kind: 'thd', maxPercent: 8 },
  );
  const [intervals, setIntervals] = useState(200);
  const [asked, setAsked] = useState<VariableValue | null>(null);
  const { state, run, cancel } = useStudyWork<GoalOutcome>(() => undefined);
  const target = values.find((value) => keyOf(value) === chosen) ?? values[0];
  if (!target) return <Text fontSize="13px">No stage that is on has a value to search for.</Text>;
  const key = keyOf(target);
  const { from, to } = range?.of === key ? range : rangeAbout(target.value);
  const { unit } = target.parameter;
  const start = () => {
    const draft = store.draft();
    setAsked(target);
    run({
      kind: 'goal',
      specs: stagesOn(draft.stages).map(({ stage }) => specOf(stage)),
      place: { stage: target.place, parameter: target.parameter.name },
      ...{ from, to, intervals, goal },
      series: draft.series,
      thdMaxOrder: draft.thdMaxOrder,
      limitSet: store.limitSet(),
      judgement: draft.judgement,
      output: { quantity: draft.outputQuantity, unit: draft.outputUnit },
    });
  };
  const apply = (value: number) => {
    if (!asked) return;
    const set = (next: number) =>
      store.change((draft) => ({
        ...draft,
        stages: draft.stages.map((stage, i) =>
          i === asked.stage && stage.spec.kind === 'circuit'
            ? {
                ...stage,
                spec: { ...stage.spec, values: { ...stage.spec.values, [asked.parameter.name]: next } },
              }
            : stage,
        ),
      }));
    const was = values.find((each) => keyOf(each) === keyOf(asked))?.value ?? asked.value;
    set(value);
    notifyDone(`${asked.label} is now ${valueText(value, asked.parameter.unit)}`, () => set(was));
  };
  return (
    <Box>
      <Box display="grid" gridTemplateColumns={{ base: '1fr', md: '1fr 1fr' }} gap="3" maxW="2xl">
        <FormField label="Value">
          <SelectInput
            options={values.map((value) => ({ value: keyOf(value), label: value.label }))}
            value={key}
            onChange={(event) => setChosen(event.target.value)}
          />
        </FormField>
        <Flex gap="3">
          <RangeEnd
            key={`from ${key}`}
            label="From"
            unit={unit}
            value={from}
            onChange={(value) => setRange({ of: key, from: value, to })}
          />
          <RangeEnd
            key={`to ${key}`}
            label="To"
            unit={unit}
            value={to}
            onChange={(value) => setRange({ of: key, from, to: value })}
          />
        </Flex>
        <FormField
          label="Goal"
          help={goal.kind === 'verdict' && !hasLimits ? 'Choose limits first, under Judged by.' : undefined}
        >
          <SelectInput
            options={goals}
            value={goal.kind}
            onChange={(event) =>
              setGoal(
                event.target.value === 'thd'
                  ? { kind: 'thd', maxPercent: 8 }
                  : { kind: 'verdict', marginPercent: 10 },
              )
            }
          />
        </FormField>
        <Flex gap="3">
          <FormField label={goal.kind === 'thd' ? 'THD in %' : 'Margin in %'}>
            {goal.kind === 'thd' ? (
              <NumberInput
                value={goal.maxPercent}
                min={0.001}
                max={1000}
                onChange={(maxPercent) => setGoal({ ...goal, maxPercent })}
              />
            ) : (
              <NumberInput
                value={goal.marginPercent}
                min={0}
                max={99}
                onChange={(marginPercent) => setGoal({ ...goal, marginPercent })}
              />
            )}
          </FormField>
          <FormField label="Steps of the grid">
            <NumberInput
              value={intervals}
              min={10}
              max={5000}
              onChange={(value) => setIntervals(Math.round(value))}
            />
          </FormField>
        </Flex>
      </Box>
      <Button
        mt="3"
        disabled={state.kind === 'running' || (goal.kind === 'verdict' && !hasLimits)}
        onClick={start}
      >
        Search
      </Button>
      <WorkProgress label="Search for the smallest value" state={state} onCancel={cancel} />
      {state.kind === 'done' && asked ? (
        <Outcome outcome={state.outcome} asked={asked} onApply={disabled ? null : apply} />
      ) : null}
    </Box>
  );
}

/** A decade to both sides. */
const rangeAbout = (value: number) =>
  value > 0 ? { from: value / 10, to: value * 10 } : { from: 0, to: 2 * Math.abs(value) || 1 };

interface OutcomeProps {
  outcome: GoalOutcome;
  asked: VariableValue;
  onApply: ((value: number) => void) | null;
}

function Outcome({ outcome, asked, onApply }: OutcomeProps) {
  const { result, scale, intervals } = outcome;
  const { unit } = asked.parameter;
  const grid = `Grid of ${intervals} ${scale} steps, ${valueText(result.gridStep, unit)} wide ${result.isFound ? 'there' : 'at the upper end'}: a stretch that does and is narrower could be missed.`;
  if (!result.isFound) {
    return (
      <Box role="status" mt="3" borderLeftWidth="3px" borderColor="near" pl="3" fontSize="13px">
        <Text fontWeight="600">No solution in range</Text>
        {result.best ? (
          <Text>{`Nearest comes ${valueText(result.best.value, unit)}, short of the goal by ${formatPercent(-100 * result.best.margin)}.`}</Text>
        ) : (
          <Text>No value of the range gives a steady state that can be judged.</Text>
        )}
        <Text color="inkSoft">{grid}</Text>
      </Box>
    );
  }
  // Rounded up in the sixth digit, so that what is written still does.
  const value = roundedUp(result.value);
  return (
    <Box role="status" mt="3" borderLeftWidth="3px" borderColor="within" pl="3" fontSize="13px">
      <Text fontWeight="600">{`${asked.label} = ${valueText(value, unit)}`}</Text>
      <Text>
        {result.failsAt === null
          ? 'The goal is met from the lower end of the range on; a lower start may find a smaller value.'
          : `The smallest that does; just below, at ${valueText(result.failsAt, unit)}, the goal is missed.`}
      </Text>
      <Text color="inkSoft">{grid}</Text>
      {onApply ? (
        <Button mt="2" size="xs" onClick={() => onApply(value)}>
          Take this value
        </Button>
      ) : null}
    </Box>
  );
}

function roundedUp(value: number): number {
  const step = 10 ** (Math.floor(Math.log10(Math.abs(value) || 1)) - 5);
  return Number((Math.ceil(value / step - 1e-9) * step).toPrecision(6));
}
