import type { CreateReport, Report } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { reportQuery } from '../api/get-report.js';
import { stepReport, type Step } from '../api/step-report.js';
import { deleteReport, updateReport } from '../api/write-report.js';

const done: Record<Step, (report: Report) => string> = {
  submit: () => 'Submitted for review',
  return: () => 'Returned to its author',
  issue: ({ number }) => `Issued as ${number ?? 'a numbered report'}`,
};

/** What can be done with a report; the server decides whether it is allowed. */
export function useReportChanges({ id, projectId, title }: Pick<Report, 'id' | 'projectId' | 'title'>) {
  const queryClient = useQueryClient();
  const keep = async (report: Report) => {
    queryClient.setQueryData(reportQuery(id).queryKey, report);
    await queryClient.invalidateQueries({ queryKey: ['projects', projectId, 'reports'] });
  };
  const step = useMutation({
    mutationFn: ({ step, comment }: { step: Step; comment: string }) => stepReport(id, step, comment),
    onSuccess: async (report, { step }) => {
      await keep(report);
      notifyDone(done[step](report));
    },
    // Somebody else may have moved it meanwhile; show where it stands now.
    onError: () => queryClient.invalidateQueries({ queryKey: reportQuery(id).queryKey }),
  });
  const update = async (input: CreateReport) => {
    const report = await updateReport(id, input);
    await keep(report);
    return report;
  };
  const remove = useMutation({
    mutationFn: () => deleteReport(id),
    onSuccess: async () => {
      await queryClient.invalidateQueries({ queryKey: ['projects', projectId] });
      notifyDone(`Draft “${title}” deleted`);
    },
    onError: (error) => notifyProblem('Not deleted', error),
  });
  return { step, update, remove };
}
