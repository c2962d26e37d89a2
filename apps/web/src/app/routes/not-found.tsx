import { Link } from '@chakra-ui/react';
import { Link as RouterLink } from 'react-router-dom';
import { EmptyState } from '../../components/empty-state.js';
import { PageHeader } from '../../components/page-header.js';
import { paths } from '../paths.js';

/** For addresses that lead nowhere. */
export function Component() {
  return (
    <>
      <PageHeader title="There is no such page" />
      <EmptyState
        title="The address leads nowhere"
        actions={
          <Link asChild>
            <RouterLink to={paths.projects()}>All projects</RouterLink>
          </Link>
        }
      >
        It may have been typed or copied in part.
      </EmptyState>
    </>
  );
}
