import { Box, Link } from '@chakra-ui/react';
import { isRouteErrorResponse, Link as RouterLink, useRevalidator, useRouteError } from 'react-router-dom';
import { ErrorState } from '../../components/error-state.js';
import { ApiProblem } from '../../lib/api-problem.js';
import { paths } from '../paths.js';

/** What a page shows in its own place when it cannot be shown. */
export function RouteProblem() {
  const error = useRouteError();
  const revalidator = useRevalidator();
  const missing =
    (error instanceof ApiProblem && error.status === 404) ||
    (isRouteErrorResponse(error) && error.status === 404);
  return (
    <Box py="4">
      <title>Not shown · Overtally</title>
      {missing ? (
        <ErrorState
          error={new Error('It was removed, or it belongs to a project you are not a member of.')}
          title="There is no such page"
        />
      ) : (
        <ErrorState error={error} onRetry={() => void revalidator.revalidate()} />
      )}
      <Link asChild mt="4">
        <RouterLink to={paths.projects()}>All projects</RouterLink>
      </Link>
    </Box>
  );
}
