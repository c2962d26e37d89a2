import { holds } from '@overtally/contracts';
import { useNavigate } from 'react-router-dom';
import { EmptyState } from '../../../components/empty-state.js';
import { notifyDone } from '../../../components/notify.js';
import { PageHeader } from '../../../components/page-header.js';
import { createLimitSet } from '../../../features/limits/api/create-limit-set.js';
import { LimitSetForm } from '../../../features/limits/components/limit-set-form.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';

export function Component() {
  const project = useProject(useProjectId());
  const navigate = useNavigate();
  return (
    <>
      <PageHeader
        title="New limit set"
        subtitle="For this project alone"
        crumb="New limit set"
        documentTitle={`New limit set, ${project.name}`}
      />
      {holds('limit-set.write', project.role) ? (
        <LimitSetForm
          submitLabel="Create limit set"
          onSubmit={(input) => createLimitSet(project.id, input)}
          onDone={(set) => {
            notifyDone(`${set.title} created`);
            void navigate(paths.limitSet(project.id, set.id));
          }}
          onCancel={() => void navigate(paths.limits(project.id))}
        />
      ) : (
        <EmptyState title="Only analysts and managers make limit sets">
          Ask one of them, named under Members.
        </EmptyState>
      )}
    </>
  );
}
