import type { Report, UpdateReport } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { commentReport } from '../api/comment-report.js';
import { reportQuery } from '../api/get-report.js';
import { reviseReport } from '../api/revise-report.js';
import { stepReport, type Step, type StepName } from '../api/step-report.js';
import { deleteReport, updateReport } from '../api/write-report.js';

const done: Record<StepName, (report: Report) => string> = {
  submit: () => 'Submitted for review',
  withdraw: () => 'Withdrawn from review',
  return: () => 'Returned to its author',
  issue: ({ number, revision }) => `Issued as ${number ?? 'a numbered report'}, revision ${revision}`,
};

/** What can be done with a report; the server decides whether it is allowed. */
export function useReportChanges({ id, projectId, title }: Pick<Report, 'id' | 'projectId' | 'title'>) {
  const queryClient = useQueryClient();
  const keep = async (report: Report) => {
    queryClient.setQueryData(reportQuery(report.id).queryKey, report);
    await queryClient.invalidateQueries({ queryKey: ['projects', projectId, 'reports'] });
    // The other revision of the pair says of itself what it is replaced by.
    const others = [report.replaces?.id, report.replacedBy?.id].filter((other) => other !== undefined);
    await Promise.all(
      others.map((other) => queryClient.invalidateQueries({ queryKey: reportQuery(other).queryKey })),
    );
  };
  const step = useMutation({
    mutationFn: (move: Step) => stepReport(id, move),
    onSuccess: async (report, move) => {
      await keep(report);
      notifyDone(done[move.step](report));
    },
    // Somebody else may have moved it meanwhile; show where it stands now.
    onError: () => queryClient.invalidateQueries({ queryKey: reportQuery(id).queryKey }),
  });
  const update = async (input: UpdateReport) => {
    const report = await updateReport(id, input);
    await keep(report);
    return report;
  };
  const revise = useMutation({
    mutationFn: () => reviseReport(id),
    onSuccess: async (report) => {
      await keep(report);
      notifyDone(`Draft of revision ${report.revision} made`);
    },
    onError: (error) => notifyProblem('No revision made', error),
  });
  const comment = useMutation({
    mutationFn: (words: string) => commentReport(id, words),
    onSuccess: (report) => queryClient.setQueryData(reportQuery(id).queryKey, report),
  });
  const remove = useMutation({
    mutationFn: () => deleteReport(id),
    onSuccess: async () => {
      await queryClient.invalidateQueries({ queryKey: ['projects', projectId] });
      notifyDone(`Draft “${title}” deleted`);
    },
    onError: (error) => notifyProblem('Not deleted', error),
  });
  return { step, update, revise, comment, remove };
}
