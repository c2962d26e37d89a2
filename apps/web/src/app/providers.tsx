import { ChakraProvider } from '@chakra-ui/react';
import { QueryClientProvider } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Toaster } from '../components/toaster.js';
import { queryClient } from '../lib/query-client.js';
import { system } from '../lib/theme/system.js';

/** What every page stands on: look, server state, notices. */
export function Providers({ children }: { children: ReactNode }) {
  return (
    <ChakraProvider value={system}>
      <QueryClientProvider client={queryClient}>
        {children}
        <Toaster />
      </QueryClientProvider>
    </ChakraProvider>
  );
}
