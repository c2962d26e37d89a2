import { Stack, Text } from '@chakra-ui/react';
import {
  decisionRuleSchema,
  type DecisionRule,
  type LimitSet,
  type Quantity,
  type VerdictParameters,
} from '@overtally/contracts';
import { useMemo, useState } from 'react';
import { FormField, SelectInput } from '../../../components/form-field.js';
import {
  decisionRuleNames,
  parameterWords,
  type ParameterKey,
} from '../../../components/verdict/verdict-words.js';
import { limitSetName } from '../../../lib/limit-set-name.js';
import { numberText } from '../../../lib/number-text.js';
import { askedParameters, readParameters } from '../judge-draft.js';
import { ParameterFields } from './parameter-fields.js';

interface Judgement {
  limitSetId: string;
  parameters: VerdictParameters;
  decisionRule: DecisionRule;
}

interface JudgementFieldsProps<J extends Judgement> {
  limitSets: readonly LimitSet[];
  quantity: Quantity;
  judgement: J | null;
  disabled: boolean;
  onChange: (judgement: J | null) => void;
  /** What a judgement holds beside these fields. */
  rest: Omit<J, keyof Judgement>;
}

const ruleOptions = decisionRuleSchema.options.map((value) => ({ value, label: decisionRuleNames[value] }));

/** Limit set, decision rule and parameters for what is not a recorded channel; nothing is judged without a set. */
export function JudgementFields<J extends Judgement>(props: JudgementFieldsProps<J>) {
  const { limitSets, quantity, judgement, disabled, onChange, rest } = props;
  const set = limitSets.find(({ id }) => id === judgement?.limitSetId);
  const rule = judgement?.decisionRule ?? 'simple-acceptance';
  const asked = useMemo(() => (set ? askedParameters(set, rule) : null), [set, rule]);
  const [typed, setTyped] = useState<Partial<Record<ParameterKey, string>>>({});
  const kept = judgement?.parameters ?? {};
  const entries = { ...textsOf(kept), ...typed };
  const read = asked ? readParameters(asked, entries) : null;
  const options = [
    { value: '', label: 'No limits' },
    ...limitSets
      .filter((each) => each.quantity === quantity || each.id === set?.id)
      .map((each) => ({ value: each.id, label: limitSetName(each) })),
  ];
  const put = (change: Partial<Judgement>) =>
    onChange({
      ...rest,
      limitSetId: '',
      parameters: kept,
      decisionRule: rule,
      ...(judgement ?? {}),
      ...change,
    } as J);
  return (
    <Stack gap="3">
      <FormField label="Limits">
        <SelectInput
          options={options}
          value={judgement?.limitSetId ?? ''}
          disabled={disabled}
          onChange={({ target: { value } }) => (value === '' ? onChange(null) : put({ limitSetId: value }))}
        />
      </FormField>
      {set ? (
        <FormField label="Decision rule">
          <SelectInput
            options={ruleOptions}
            value={rule}
            disabled={disabled}
            onChange={(event) => put({ decisionRule: decisionRuleSchema.parse(event.target.value) })}
          />
        </FormField>
      ) : null}
      {asked && read && !disabled ? (
        <ParameterFields
          asked={asked}
          entries={entries}
          problems={read.problems}
          onChange={(key, text) => {
            const next = { ...typed, [key]: text };
            setTyped(next);
            put({ parameters: readParameters(asked, { ...textsOf(kept), ...next }).parameters });
          }}
        />
      ) : null}
      {read && read.missing.length > 0 ? (
        <Text fontSize="13px" color="near">
          {`Still needed: ${read.missing.map((key) => parameterWords[key].label).join(', ')}.`}
        </Text>
      ) : null}
    </Stack>
  );
}

const textsOf = (parameters: VerdictParameters): Partial<Record<ParameterKey, string>> =>
  Object.fromEntries(Object.entries(parameters).map(([key, value]) => [key, numberText(value)]));
