import { QueryClient } from '@tanstack/react-query';
import { ApiProblem } from './api-problem.js';

/** A refusal stays a refusal; only lost connections and server faults are worth another try. */
function retry(failures: number, error: Error): boolean {
  const worthwhile = error instanceof ApiProblem && (error.status === 0 || error.status >= 500);
  return worthwhile && failures < 2;
}

/** The one cache of server state; route loaders and components share it. */
export const queryClient = new QueryClient({
  defaultOptions: {
    queries: { staleTime: 15_000, retry },
    mutations: { retry: false },
  },
});
