import { Button } from '@chakra-ui/react';
import { useSignOut } from './use-sign-out.js';

export function SignOutButton() {
  return <Button onClick={useSignOut()}>Sign out</Button>;
}
