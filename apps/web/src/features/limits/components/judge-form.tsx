import { Stack, Text } from '@chakra-ui/react';
import { decisionRuleSchema, type ChannelAnalysis, type LimitSet } from '@overtally/contracts';
import { evaluate, measurementOfChannel } from '@overtally/limits';
import { useMemo } from 'react';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { decisionRuleNames, parameterWords } from '../../../components/verdict/verdict-words.js';
import { limitSetName } from '../../../lib/limit-set-name.js';
import { askedParameters, readParameters, setsForChannel, type JudgeDraft } from '../judge-draft.js';
import type { RepeatCandidate } from '../repeat-candidates.js';
import { Judgement } from './judgement.js';
import { LimitSetSelect } from './limit-set-select.js';
import { ParameterFields } from './parameter-fields.js';
import { RepeatFields } from './repeat-fields.js';
import { SetSource } from './set-source.js';

interface JudgeFormProps {
  channels: readonly ChannelAnalysis[];
  limitSets: readonly LimitSet[];
  repeatCandidates: readonly RepeatCandidate[];
  draft: JudgeDraft;
  onChange: (draft: JudgeDraft) => void;
}

const ruleOptions = decisionRuleSchema.options.map((value) => ({ value, label: decisionRuleNames[value] }));

/** Channel, limit set, parameters and decision rule, with what they would lead to. */
export function JudgeForm({ channels, limitSets, repeatCandidates, draft, onChange }: JudgeFormProps) {
  const channel = channels.find(({ index }) => index === draft.channel);
  const set = limitSets.find(({ id }) => id === draft.limitSetId);
  const { fitting, others } = setsForChannel(limitSets, channel);
  const asked = useMemo(
    () => (set ? askedParameters(set, draft.decisionRule, channel) : { needed: [], optional: [] }),
    [set, draft.decisionRule, channel],
  );
  const read = useMemo(() => readParameters(asked, draft.entries), [asked, draft.entries]);
  const preview = useMemo(
    () =>
      set && channel
        ? evaluate(set, measurementOfChannel(channel), {
            parameters: read.parameters,
            decisionRule: draft.decisionRule,
          })
        : null,
    [set, channel, read, draft.decisionRule],
  );
  const choose = (index: number) => {
    const next = channels.find((candidate) => candidate.index === index);
    const first = setsForChannel(limitSets, next).fitting[0];
    const keeps = set !== undefined && set.quantity === next?.quantity;
    onChange({
      ...draft,
      channel: index,
      repeats: [],
      limitSetId: keeps ? draft.limitSetId : (first?.id ?? draft.limitSetId),
    });
  };
  return (
    <Stack gap="4">
      <Stack direction={{ base: 'column', sm: 'row' }} gap="4">
        <FormField label="Channel">
          <SelectInput
            options={channels.map(({ index, name, unit }) => ({
              value: String(index),
              label: unit ? `${name} in ${unit}` : name,
            }))}
            value={String(draft.channel)}
            onChange={(event) => choose(Number(event.target.value))}
          />
        </FormField>
        <FormField label="Limit set">
          <LimitSetSelect
            fitting={fitting}
            others={others}
            value={draft.limitSetId}
            onChange={(limitSetId) => onChange({ ...draft, limitSetId })}
          />
        </FormField>
      </Stack>
      {set ? <SetSource set={set} /> : null}
      <FormField label="Decision rule" help={preview?.decisionRuleText}>
        <SelectInput
          options={ruleOptions}
          value={draft.decisionRule}
          onChange={(event) =>
            onChange({ ...draft, decisionRule: decisionRuleSchema.parse(event.target.value) })
          }
        />
      </FormField>
      <ParameterFields
        asked={asked}
        entries={draft.entries}
        problems={read.problems}
        onChange={(key, text) => onChange({ ...draft, entries: { ...draft.entries, [key]: text } })}
      />
      {channel ? (
        <RepeatFields
          candidates={repeatCandidates}
          channel={channel}
          chosen={draft.repeats}
          onChange={(repeats) => onChange({ ...draft, repeats })}
        />
      ) : null}
      {read.missing.length > 0 ? (
        <Text color="near">
          {`Still needed: ${read.missing.map((key) => parameterWords[key].label).join(', ')}.`}
        </Text>
      ) : preview && set && channel ? (
        <Judgement
          preview
          caption={previewCaption(draft.repeats.length)}
          subject={`${limitSetName(set)}, ${channel.name}`}
          unit={channel.unit}
          fileName={`preview-${channel.name}`}
          judgement={preview}
        />
      ) : null}
    </Stack>
  );
}

/** What the preview leaves out: the server adds it when the verdict is stored. */
function previewCaption(repeats: number): string {
  const more = repeats === 0 ? '' : `, and ${repeats === 1 ? 'the repeat' : `the ${repeats} repeats`}`;
  return `Preview of this recording, not stored. The stored verdict also takes values over time and a recorded supply voltage into account${more}.`;
}
