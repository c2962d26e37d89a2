import type { ProjectRole } from '@overtally/contracts';

/** What a role lets a person do, as a message says it. */
export const roleWords: Record<ProjectRole, string> = {
  technician: 'technician, who brings captures in and runs analyses',
  analyst: 'analyst, who judges captures and prepares reports',
  manager: 'manager, who reviews and issues reports and looks after members',
  guest: 'guest, who reads recordings and issued reports',
};
