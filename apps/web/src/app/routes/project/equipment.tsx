import { Button } from '@chakra-ui/react';
import { holds, type Equipment } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { EmptyState } from '../../../components/empty-state.js';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { EquipmentDialog } from '../../../features/equipment/components/equipment-dialog.js';
import { EquipmentList } from '../../../features/equipment/components/equipment-list.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { equipmentQuery } from '../../../lib/bench-queries.js';
import { paths } from '../../paths.js';
import { useProjectId } from '../../use-project-id.js';

export function Component() {
  const project = useProject(useProjectId());
  const equipment = useQuery(equipmentQuery(project.id));
  const [edited, setEdited] = useState<Equipment | 'new' | null>(null);
  const mayWrite = holds('equipment.write', project.role);
  const create = (
    <Button variant="solid" onClick={() => setEdited('new')}>
      New equipment
    </Button>
  );
  const isEmpty = equipment.data?.length === 0;
  return (
    <>
      <PageHeader
        title="Equipment under test"
        subtitle="What is tested, what its rating plate says, and how it is run."
        documentTitle={`Equipment, ${project.name}`}
        actions={mayWrite && !isEmpty ? create : undefined}
      />
      {equipment.isPending ? <LoadingState label="Loading the equipment" /> : null}
      {equipment.isError ? (
        <ErrorState error={equipment.error} onRetry={() => void equipment.refetch()} />
      ) : null}
      {isEmpty ? (
        <EmptyState title="No equipment yet" actions={mayWrite ? create : undefined}>
          {mayWrite
            ? 'Enter what is tested with its ratings and operating modes; recordings, verdicts and reports then take them from here.'
            : 'Technicians of the project enter what is tested.'}
        </EmptyState>
      ) : null}
      {equipment.data && !isEmpty ? (
        <EquipmentList
          projectId={project.id}
          equipment={equipment.data}
          recordingsTo={(id) => `${paths.recordings(project.id)}?equipment=${id}`}
          mayWrite={mayWrite}
          onEdit={setEdited}
        />
      ) : null}
      <EquipmentDialog
        key={edited === null || edited === 'new' ? edited : edited.id}
        projectId={project.id}
        equipment={edited === 'new' ? null : edited}
        open={edited !== null}
        onClose={() => setEdited(null)}
      />
    </>
  );
}
