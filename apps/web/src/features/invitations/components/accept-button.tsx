import { Button, Stack, Text } from '@chakra-ui/react';
import type { AcceptedInvitation } from '@overtally/contracts';
import { useMutation } from '@tanstack/react-query';
import { FormProblem } from '../../../components/form-problem.js';
import { problemText } from '../../../lib/api-problem.js';
import { acceptInvitation } from '../api/accept-invitation.js';

interface AcceptButtonProps {
  token: string;
  email: string;
  onAccepted: (accepted: AcceptedInvitation) => void;
}

/** Accepts as the person who is signed in. */
export function AcceptButton({ token, email, onAccepted }: AcceptButtonProps) {
  const accept = useMutation({ mutationFn: () => acceptInvitation({ token }), onSuccess: onAccepted });
  return (
    <Stack gap="4">
      <FormProblem message={accept.isError ? problemText(accept.error) : undefined} />
      <Text>You are signed in as {email}.</Text>
      <Button variant="solid" loading={accept.isPending} onClick={() => accept.mutate()}>
        Accept
      </Button>
    </Stack>
  );
}
