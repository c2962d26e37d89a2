import { EmptyState } from '../../../components/empty-state.js';
import { PageHeader } from '../../../components/page-header.js';

/** What people who do not work in the laboratory read in place of its instruments or chains. */
export function LaboratoryOnly({ title }: { title: string }) {
  return (
    <>
      <PageHeader title={title} />
      <EmptyState title={`${title} are the laboratory's own`}>
        Technicians, analysts and managers of its projects see them. What a report was measured with stands in
        the report.
      </EmptyState>
    </>
  );
}
