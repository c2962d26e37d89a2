import { Button, Menu, Portal } from '@chakra-ui/react';
import type { UpdateUser, User } from '@overtally/contracts';
import { useState } from 'react';
import { ConfirmDialog } from '../../../components/confirm-dialog.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { useUserChanges } from '../hooks/use-user-changes.js';
import { ResetPasswordDialog } from './reset-password-dialog.js';

interface UserMenuProps {
  user: User;
  isOwn: boolean;
}

/** What an administrator can change about an account. */
export function UserMenu({ user, isOwn }: UserMenuProps) {
  const [asked, setAsked] = useState<'password' | 'disable' | null>(null);
  const { update } = useUserChanges();
  const close = () => setAsked(null);
  const change = (wanted: UpdateUser, done: string, undo?: UpdateUser) =>
    update.mutate(
      { user, change: wanted },
      {
        onSuccess: () => notifyDone(done, undo ? () => change(undo, `${user.name}: undone`) : undefined),
        onError: (error) => notifyProblem(`${user.name} not changed`, error),
        onSettled: close,
      },
    );
  const switchAdministrator = () =>
    change(
      { isAdministrator: !user.isAdministrator },
      user.isAdministrator ? `${user.name} is no longer administrator` : `${user.name} is administrator`,
      { isAdministrator: user.isAdministrator },
    );
  return (
    <>
      <Menu.Root positioning={{ placement: 'bottom-end' }}>
        <Menu.Trigger asChild>
          <Button size="xs" aria-label={`Change ${user.name}`}>
            Change
          </Button>
        </Menu.Trigger>
        <Portal>
          <Menu.Positioner>
            <Menu.Content>
              <Menu.Item value="password" onSelect={() => setAsked('password')}>
                New password
              </Menu.Item>
              <Menu.Item value="administrator" disabled={isOwn} onSelect={switchAdministrator}>
                {user.isAdministrator ? 'End as administrator' : 'Make administrator'}
              </Menu.Item>
              {user.disabledAt ? (
                <Menu.Item
                  value="enable"
                  onSelect={() => change({ disabled: false }, `${user.name} can sign in again`)}
                >
                  Enable
                </Menu.Item>
              ) : (
                <Menu.Item value="disable" disabled={isOwn} color="over" onSelect={() => setAsked('disable')}>
                  Disable
                </Menu.Item>
              )}
            </Menu.Content>
          </Menu.Positioner>
        </Portal>
      </Menu.Root>
      <ResetPasswordDialog user={user} open={asked === 'password'} onClose={close} />
      <ConfirmDialog
        open={asked === 'disable'}
        onClose={close}
        title={`Disable ${user.name}?`}
        confirmLabel={`Disable ${user.name}`}
        destructive
        pending={update.isPending}
        onConfirm={() =>
          change({ disabled: true }, `${user.name} can no longer sign in`, { disabled: false })
        }
      >
        {user.name} is signed out everywhere. What they made stays, with their name. You can enable the
        account again.
      </ConfirmDialog>
    </>
  );
}
