import { Button, Flex, Text } from '@chakra-ui/react';
import type { WorkState } from '../varying/use-study-work.js';

interface WorkProgressProps {
  label: string;
  state: WorkState<unknown>;
  onCancel: () => void;
}

/** How far work is, with the way out; what went wrong with it. */
export function WorkProgress({ label, state, onCancel }: WorkProgressProps) {
  if (state.kind === 'failed') {
    return (
      <Text role="alert" color="over" fontSize="13px" mt="2">
        {state.fault}
      </Text>
    );
  }
  if (state.kind !== 'running') return null;
  return (
    <Flex align="center" gap="3" mt="2">
      <progress aria-label={label} max={1} value={state.progress} />
      <Text fontSize="13px" fontFamily="mono">
        {`${Math.round(100 * state.progress)} %`}
      </Text>
      <Button size="xs" onClick={onCancel}>
        Cancel
      </Button>
    </Flex>
  );
}
