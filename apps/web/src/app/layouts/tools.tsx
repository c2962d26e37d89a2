import { Box, Button, chakra, Menu, Portal } from '@chakra-ui/react';
import type { Account } from '@overtally/contracts';
import { useNavigate } from 'react-router-dom';
import { ThemeSwitch } from '../../components/theme-switch.js';
import { paths } from '../paths.js';
import { useSignOut } from './use-sign-out.js';

/** Right end of the top bar: theme, and what belongs to the account. */
export function Tools({ account }: { account: Account }) {
  const navigate = useNavigate();
  const leave = useSignOut();
  return (
    <>
      <ThemeSwitch />
      <Menu.Root positioning={{ placement: 'bottom-end' }}>
        <Menu.Trigger asChild>
          <Button variant="ghost" colorPalette="gray" fontWeight="400" maxW={{ base: '9rem', md: '15rem' }}>
            <Box as="span" truncate>
              {account.name}
            </Box>
            <chakra.svg
              viewBox="0 0 10 6"
              width="2.5"
              height="1.5"
              fill="none"
              stroke="currentColor"
              aria-hidden="true"
            >
              <path d="m1 1 4 4 4-4" />
            </chakra.svg>
          </Button>
        </Menu.Trigger>
        <Portal>
          <Menu.Positioner>
            <Menu.Content>
              <Menu.Item value="account" onSelect={() => void navigate(paths.account())}>
                Account
              </Menu.Item>
              {account.isAdministrator ? (
                <Menu.Item value="people" onSelect={() => void navigate(paths.people())}>
                  People
                </Menu.Item>
              ) : null}
              <Menu.Separator borderColor="rule" />
              <Menu.Item value="sign-out" onSelect={leave}>
                Sign out
              </Menu.Item>
            </Menu.Content>
          </Menu.Positioner>
        </Portal>
      </Menu.Root>
    </>
  );
}
