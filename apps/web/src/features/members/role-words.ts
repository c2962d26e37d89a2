import { projectRoleSchema, type Permission, type ProjectRole } from '@overtally/contracts';

/** Roles in the order of the work. */
export const roles: readonly ProjectRole[] = projectRoleSchema.options;

export const roleLabels: Record<ProjectRole, string> = {
  technician: 'Technician',
  analyst: 'Analyst',
  manager: 'Manager',
  guest: 'Guest',
};

export const roleOptions = roles.map((role) => ({ value: role, label: roleLabels[role] }));

/** What the table of roles shows, each row by the permission that decides it. */
export const duties: readonly { permission: Permission; label: string }[] = [
  { permission: 'recording.read', label: 'See recordings and analyses' },
  { permission: 'report.read', label: 'See reports' },
  { permission: 'recording.upload', label: 'Add recordings' },
  { permission: 'recording.update', label: 'Change names, scaling and bench data' },
  { permission: 'analysis.run', label: 'Run analyses' },
  { permission: 'note.write', label: 'Write notes' },
  { permission: 'recording.delete', label: 'Remove recordings' },
  { permission: 'limit-set.write', label: 'Make limit sets' },
  { permission: 'verdict.create', label: 'Judge against limits' },
  { permission: 'report.write', label: 'Write reports' },
  { permission: 'report.submit', label: 'Send reports to review' },
  { permission: 'report.decide', label: 'Return and issue reports' },
  { permission: 'delivery.send', label: 'Send issued reports to recipients' },
  { permission: 'member.manage', label: 'Add, invite and remove members' },
  { permission: 'project.update', label: 'Change the project' },
];
