import { useParams } from 'react-router-dom';

/** Project of the address; for pages below /projects/:projectId. */
export function useProjectId(): string {
  const { projectId } = useParams();
  if (!projectId) throw new Error('This page must stand below /projects/:projectId');
  return projectId;
}
