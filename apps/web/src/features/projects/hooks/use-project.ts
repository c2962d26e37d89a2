import type { Project } from '@overtally/contracts';
import { useSuspenseQuery } from '@tanstack/react-query';
import { projectQuery } from '../api/get-project.js';

/** The project of the page; the route's loader has fetched it. */
export function useProject(projectId: string): Project {
  return useSuspenseQuery(projectQuery(projectId)).data;
}
