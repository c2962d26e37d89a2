import type { UpdateProject } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { projectQuery } from '../api/get-project.js';
import { projectListsKey } from '../api/list-projects.js';
import { updateProject } from '../api/update-project.js';

/** Changes a project and what is shown of it. */
export function useUpdateProject(projectId: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (change: UpdateProject) => updateProject(projectId, change),
    onSuccess: (project) => {
      queryClient.setQueryData(projectQuery(projectId).queryKey, project);
      return queryClient.invalidateQueries({ queryKey: projectListsKey });
    },
  });
}
