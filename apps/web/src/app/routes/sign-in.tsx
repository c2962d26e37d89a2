import { Box, Flex, Heading, Text } from '@chakra-ui/react';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { BrandMark } from '../../components/brand-mark.js';
import { Sheet } from '../../components/sheet.js';
import { ThemeSwitch } from '../../components/theme-switch.js';
import { accountQuery } from '../../features/account/api/get-account.js';
import { SignInForm } from '../../features/auth/components/sign-in-form.js';
import { queryClient } from '../../lib/query-client.js';
import { safeNext } from '../paths.js';

export function Component() {
  const navigate = useNavigate();
  const [search] = useSearchParams();
  return (
    <Flex direction="column" minH="100dvh" px="4">
      <title>Sign in · Overtally</title>
      <Flex justify="flex-end" py="2">
        <ThemeSwitch />
      </Flex>
      <Flex as="main" flex="1" direction="column" align="center" justify="center" pb="16">
        <Box w="full" maxW="360px">
          <Box mb="5">
            <BrandMark named />
          </Box>
          <Sheet px="6" py="6">
            <Heading as="h1" fontSize="xl" lineHeight="1.25" mb="4">
              Sign in
            </Heading>
            <SignInForm
              onSignedIn={(account) => {
                queryClient.clear();
                queryClient.setQueryData(accountQuery().queryKey, account);
                void navigate(safeNext(search.get('next')), { replace: true });
              }}
            />
          </Sheet>
          <Text color="inkSoft" fontSize="13px" mt="4">
            No account yet, or the password is lost? Ask your administrator.
          </Text>
        </Box>
      </Flex>
      <Text as="footer" color="inkSoft" fontSize="xs" textAlign="center" py="4" mx="auto" maxW="70ch">
        Work on mains circuits can kill: only qualified persons, with rated probes and isolation, under the
        local codes.
      </Text>
    </Flex>
  );
}
