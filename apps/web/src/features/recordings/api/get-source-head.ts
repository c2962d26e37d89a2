import type { Recording } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { ApiProblem } from '../../../lib/api-problem.js';
import { apiUrl } from '../../../lib/http.js';
import { headBytes } from './preview-import.js';

/** The beginning of a kept source, as a file for the import preview. */
export const sourceHeadQuery = (recording: Pick<Recording, 'id' | 'file'>) =>
  queryOptions({
    queryKey: ['recordings', recording.id, 'source-head'],
    queryFn: async ({ signal }) => {
      const response = await fetch(apiUrl(`/recordings/${recording.id}/source`), {
        headers: { range: `bytes=0-${headBytes - 1}` },
        credentials: 'same-origin',
        signal,
      });
      // 416: there is no byte to ask for, the source is empty.
      if (!response.ok && response.status !== 416) {
        throw new ApiProblem({ status: response.status, title: 'The source could not be fetched' });
      }
      const head = response.status === 416 ? new Blob([]) : await response.blob();
      return new File([head], recording.file.name);
    },
    staleTime: Infinity,
  });
