import { Box, Button, Checkbox, Flex, Input, Stack, Text } from '@chakra-ui/react';
import type { ChannelSummary, Recording } from '@overtally/contracts';
import { useState, type ReactNode } from 'react';
import { FormField } from '../../../components/form-field.js';
import { Modal } from '../../../components/modal.js';
import { formatPercent, formatSi } from '../../../lib/format.js';
import { overlayCapacity } from '../overlay-link.js';

export interface PickedChannel {
  recordingId: string;
  channel: number;
}

interface PickerDialogProps {
  onClose: () => void;
  /** Recordings found for the search. */
  recordings: readonly Recording[];
  search: string;
  onSearch: (search: string) => void;
  /** What stands under the list: loading, a problem, nothing found, more to show. */
  foot: ReactNode;
  /** Channels in the overlay already. */
  present: readonly PickedChannel[];
  onAdd: (channels: PickedChannel[]) => void;
}

const keyOf = ({ recordingId, channel }: PickedChannel) => `${recordingId}:${channel}`;

/** Choice of channels out of the project's recordings. */
export function PickerDialog(props: PickerDialogProps) {
  const { onClose, recordings, search, onSearch, foot, present, onAdd } = props;
  const [picked, setPicked] = useState<PickedChannel[]>([]);
  const room = overlayCapacity - present.length - picked.length;
  const presentKeys = new Set(present.map(keyOf));
  const pickedKeys = new Set(picked.map(keyOf));
  const toggle = (channel: PickedChannel, chosen: boolean) =>
    setPicked((before) =>
      chosen ? [...before, channel] : before.filter((other) => keyOf(other) !== keyOf(channel)),
    );
  return (
    <Modal
      open
      onClose={onClose}
      title="Add channels"
      size="lg"
      footer={
        <>
          <Text mr="auto" color={room <= 0 ? 'near' : 'inkSoft'} role="status">
            {room <= 0 ? `An overlay holds ${overlayCapacity} channels: it is full` : `Room for ${room} more`}
          </Text>
          <Button onClick={onClose}>Cancel</Button>
          <Button variant="solid" disabled={picked.length === 0} onClick={() => onAdd(picked)}>
            {picked.length < 2 ? 'Add to the overlay' : `Add ${picked.length} channels`}
          </Button>
        </>
      }
    >
      <Stack gap="3">
        <FormField label="Search">
          <Input
            type="search"
            placeholder="Number, name, EUT, file"
            value={search}
            onChange={(event) => onSearch(event.target.value)}
          />
        </FormField>
        <Box
          maxH="52vh"
          overflowY="auto"
          borderTopWidth="1px"
          borderColor="rule"
          tabIndex={0}
          role="region"
          aria-label="Recordings"
        >
          {recordings.map((recording) => (
            <Box key={recording.id} py="2.5" borderBottomWidth="1px" borderColor="rule">
              <Text>
                <Box as="span" fontWeight="600" mr="2">
                  {recording.number}
                </Box>
                {recording.name}
              </Text>
              <Flex columnGap="5" rowGap="1.5" wrap="wrap" mt="1.5">
                {recording.summaries.map((summary) => {
                  const channel = { recordingId: recording.id, channel: summary.channel };
                  const isPresent = presentKeys.has(keyOf(channel));
                  const isPicked = pickedKeys.has(keyOf(channel));
                  return (
                    <ChannelChoice
                      key={summary.channel}
                      name={`${recording.number} ${summary.name}`}
                      summary={summary}
                      checked={isPresent || isPicked}
                      disabled={isPresent || (!isPicked && room <= 0)}
                      onChange={(chosen) => toggle(channel, chosen)}
                    />
                  );
                })}
                {recording.summaries.length === 0 ? <Text color="inkSoft">Not analysed yet</Text> : null}
              </Flex>
            </Box>
          ))}
          {foot}
        </Box>
      </Stack>
    </Modal>
  );
}

function ChannelChoice(props: {
  name: string;
  summary: ChannelSummary;
  checked: boolean;
  disabled: boolean;
  onChange: (chosen: boolean) => void;
}) {
  const { summary } = props;
  return (
    <Checkbox.Root
      size="sm"
      checked={props.checked}
      disabled={props.disabled}
      onCheckedChange={({ checked }) => props.onChange(checked === true)}
    >
      <Checkbox.HiddenInput aria-label={props.name} />
      <Checkbox.Control />
      <Checkbox.Label fontWeight="400">
        {summary.name}{' '}
        <Box as="span" color="inkSoft">
          {formatSi(summary.rms, summary.unit, { digits: 3 })}
          {summary.thdFPercent === null ? '' : `, THD ${formatPercent(summary.thdFPercent)}`}
        </Box>
      </Checkbox.Label>
    </Checkbox.Root>
  );
}
