import { Button, Stack, Text } from '@chakra-ui/react';
import { useState } from 'react';
import { Link, useLocation } from 'react-router-dom';
import { ResetPasswordForm } from '../../features/auth/components/reset-password-form.js';
import { BarePage } from '../layouts/bare-page.js';
import { paths } from '../paths.js';

export function Component() {
  const token = useLocation().hash.slice(1);
  const [done, setDone] = useState(false);
  if (done) {
    return (
      <BarePage title="The password is set">
        <Next words="Sign in with the new password." to={paths.signIn()} label="Sign in" />
      </BarePage>
    );
  }
  return (
    <BarePage title="Set a new password">
      {token ? (
        <ResetPasswordForm token={token} onDone={() => setDone(true)} />
      ) : (
        <Next
          words="The link is not complete. Open it as it stands in the message, or ask for a new one."
          to={paths.forgotPassword()}
          label="Ask for a new link"
        />
      )}
    </BarePage>
  );
}

function Next({ words, to, label }: { words: string; to: string; label: string }) {
  return (
    <Stack gap="4">
      <Text role="status">{words}</Text>
      <Button asChild variant="solid">
        <Link to={to}>{label}</Link>
      </Button>
    </Stack>
  );
}
