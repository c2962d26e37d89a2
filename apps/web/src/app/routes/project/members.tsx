import { holds } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { ErrorState } from '../../../components/error-state.js';
import { LoadingState } from '../../../components/loading-state.js';
import { PageHeader } from '../../../components/page-header.js';
import { Section } from '../../../components/section.js';
import { useAccount } from '../../../features/account/hooks/use-account.js';
import { membersQuery } from '../../../features/members/api/list-members.js';
import { AddMemberForm } from '../../../features/members/components/add-member-form.js';
import { Invitations } from '../../../features/members/components/invitations.js';
import { MemberTable } from '../../../features/members/components/member-table.js';
import { RoleTable } from '../../../features/members/components/role-table.js';
import { useProject } from '../../../features/projects/hooks/use-project.js';
import { useProjectId } from '../../use-project-id.js';

export function Component() {
  const account = useAccount();
  const project = useProject(useProjectId());
  const members = useQuery(membersQuery(project.id));
  const mayManage = holds('member.manage', project.role, account.isAdministrator);
  return (
    <>
      <PageHeader
        title="Members"
        subtitle={members.isSuccess ? count(members.data.length) : undefined}
        documentTitle={`Members, ${project.name}`}
      />
      {mayManage ? <AddMemberForm projectId={project.id} /> : null}
      {members.isPending ? <LoadingState label="Loading the members" /> : null}
      {members.isError ? <ErrorState error={members.error} onRetry={() => void members.refetch()} /> : null}
      {members.isSuccess ? (
        <MemberTable projectId={project.id} members={members.data} ownId={account.id} mayManage={mayManage} />
      ) : null}
      {mayManage ? <Invitations projectId={project.id} /> : null}
      <Section title="What each role may do" mt="10">
        <RoleTable />
      </Section>
    </>
  );
}

const count = (members: number) => (members === 1 ? '1 person' : `${members} people`);
