import { projectPageSchema, type ProjectQuery } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Begins the key of every list of projects, to renew them together. */
export const projectListsKey = ['project-list'] as const;

/** Projects that the signed-in person may see, the newest first; archived ones left out, alone or too. */
export const projectsQuery = (archived: ProjectQuery['archived'] = 'false') =>
  queryOptions({
    queryKey: [...projectListsKey, archived],
    queryFn: ({ signal }) => listAll(projectPageSchema, '/projects', { query: { archived }, signal }),
  });
