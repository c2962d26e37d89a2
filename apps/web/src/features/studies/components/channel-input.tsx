import { Stack, Text } from '@chakra-ui/react';
import type { ChannelAnalysis, Recording } from '@overtally/contracts';
import { seriesOfChannel } from '@overtally/limits';
import { useState } from 'react';
import { notifyProblem } from '../../../components/notify.js';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { withInput } from '../draft.js';
import { useStudyStore } from '../study-store.js';

interface ChannelInputProps {
  /** Those with a finished analysis. */
  recordings: readonly Recording[];
  /** Channel of an analysis. */
  load: (analysisId: string, channel: number) => Promise<ChannelAnalysis>;
}

/** Takes the harmonics of a recording's channel, as its newest analysis has them. */
export function ChannelInput({ recordings, load }: ChannelInputProps) {
  const store = useStudyStore();
  const { input } = store.draft();
  const [recordingId, setRecordingId] = useState(
    () =>
      recordings.find(
        ({ latestAnalysisId }) => input.kind === 'channel' && latestAnalysisId === input.analysisId,
      )?.id ?? '',
  );
  const [channel, setChannel] = useState(input.kind === 'channel' ? input.channel : -1);
  const recording = recordings.find(({ id }) => id === recordingId);
  const take = async (index: number) => {
    const analysisId = recording?.latestAnalysisId;
    if (!analysisId || index < 0) return;
    try {
      const found = await load(analysisId, index);
      const series = seriesOfChannel(found);
      if (series === null) throw new Error('No fundamental was found in this channel; choose another one.');
      store.change((draft) =>
        withInput(draft, {
          input: { kind: 'channel', analysisId, channel: index },
          series,
          physical: { quantity: found.quantity, unit: found.unit },
        }),
      );
    } catch (error) {
      notifyProblem('The channel was not taken', error);
    }
  };
  if (recordings.length === 0) {
    return (
      <Text fontSize="13px" color="inkSoft">
        No recording of the project is analysed yet. Add one under Recordings, or begin with a textbook wave.
      </Text>
    );
  }
  return (
    <Stack gap="3">
      <FormField label="Recording">
        <SelectInput
          options={[
            { value: '', label: 'Choose' },
            ...recordings.map(({ id, number, name }) => ({ value: id, label: `${number} ${name}` })),
          ]}
          value={recordingId}
          onChange={(event) => {
            setRecordingId(event.target.value);
            setChannel(-1);
          }}
        />
      </FormField>
      {recording ? (
        <FormField label="Channel">
          <SelectInput
            options={[
              { value: '-1', label: 'Choose' },
              ...recording.channels.map(({ index, name, unit }) => ({
                value: String(index),
                label: unit ? `${name} in ${unit}` : name,
              })),
            ]}
            value={String(channel)}
            onChange={(event) => {
              const index = Number(event.target.value);
              setChannel(index);
              void take(index);
            }}
          />
        </FormField>
      ) : null}
    </Stack>
  );
}
