import { Link } from '@chakra-ui/react';
import { isRouteErrorResponse, Link as RouterLink, useRevalidator, useRouteError } from 'react-router-dom';
import { EmptyState } from '../../components/empty-state.js';
import { ErrorState } from '../../components/error-state.js';
import { PageHeader } from '../../components/page-header.js';
import { ApiProblem } from '../../lib/api-problem.js';
import { paths } from '../paths.js';

const isMissing = (error: unknown) =>
  (error instanceof ApiProblem || isRouteErrorResponse(error)) && error.status === 404;

/** What a page shows in its own place when it cannot be shown. */
export function RouteProblem() {
  const error = useRouteError();
  const revalidator = useRevalidator();
  const back = (
    <Link asChild>
      <RouterLink to={paths.projects()}>All projects</RouterLink>
    </Link>
  );
  if (isMissing(error)) {
    return (
      <>
        <PageHeader title="There is no such page" />
        <EmptyState title="Removed, or not yours to see" actions={back}>
          It was removed, or it belongs to a project that you are not a member of.
        </EmptyState>
      </>
    );
  }
  return (
    <>
      <PageHeader title="This page cannot be shown" />
      <ErrorState error={error} onRetry={() => void revalidator.revalidate()} />
    </>
  );
}
