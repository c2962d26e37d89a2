import { Button, Code, Flex, Input, Stack, Text } from '@chakra-ui/react';
import { FormField } from '../../../components/form-field.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';

/** The secret of a key just made, this once. */
export function NewSecret({ secret, onClose }: { secret: string; onClose: () => void }) {
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(secret);
      notifyDone('Access key copied');
    } catch (error) {
      notifyProblem('Access key not copied', error);
    }
  };
  return (
    <Stack gap="4">
      <Text>
        Copy the key now: it is not shown again. Scripts send it as{' '}
        <Code>Authorization: Bearer {secret.slice(0, 4)}…</Code>
      </Text>
      <FormField label="Access key" help="Keep it like a password.">
        <Flex gap="2" w="full">
          <Input
            value={secret}
            readOnly
            fontFamily="mono"
            fontSize="13px"
            onFocus={(event) => event.target.select()}
          />
          <Button variant="solid" onClick={() => void copy()}>
            Copy
          </Button>
        </Flex>
      </FormField>
      <Flex justify="flex-end">
        <Button onClick={onClose}>Done</Button>
      </Flex>
    </Stack>
  );
}
