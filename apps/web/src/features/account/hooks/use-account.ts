import type { OwnAccount } from '@overtally/contracts';
import { useSuspenseQuery } from '@tanstack/react-query';
import { accountQuery } from '../api/get-account.js';

/** The signed-in person; the route's loader has fetched it. */
export function useAccount(): OwnAccount {
  return useSuspenseQuery(accountQuery()).data;
}
