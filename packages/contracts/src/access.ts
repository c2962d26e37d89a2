import { z } from 'zod';

/** Roles a member holds in one project. */
export const projectRoleSchema = z.enum(['technician', 'analyst', 'manager', 'guest']);
export type ProjectRole = z.infer<typeof projectRoleSchema>;

const everyMember: readonly ProjectRole[] = ['technician', 'analyst', 'manager', 'guest'];
const bench: readonly ProjectRole[] = ['technician', 'analyst', 'manager'];
const analysis: readonly ProjectRole[] = ['analyst', 'manager'];
const manager: readonly ProjectRole[] = ['manager'];

/**
 * Who may do what: the one table that guards, screens and the access tests read.
 *
 * `public` needs no sign-in, `signed-in` any account, `administrator` an administrator of the
 * installation, `laboratory` an administrator or whoever works at the bench of any project (what the
 * laboratory's projects share is no business of its customers); every other entry lists the project
 * roles that hold the permission. An administrator may read every project, manage its members and send
 * its messages anew (`administratorToo`), and does nothing else in it.
 */
export const permissions = {
  'auth.sign-in': { allow: 'public' },
  'password.reset': { allow: 'public' },
  'invitation.answer': { allow: 'public' },
  'system.read': { allow: 'public' },
  'account.own': { allow: 'signed-in' },
  'project.list': { allow: 'signed-in' },
  'project.create': { allow: 'signed-in' },
  'limit-set.list': { allow: 'signed-in' },
  'user.manage': { allow: 'administrator' },
  'laboratory.read': { allow: 'signed-in' },
  'laboratory.update': { allow: 'administrator' },
  'instrument.read': { allow: 'laboratory' },
  'instrument.write': { allow: 'laboratory' },
  'mail.read': { allow: 'administrator' },
  'project.read': { allow: everyMember, administratorToo: true },
  'project.update': { allow: manager },
  'member.list': { allow: everyMember, administratorToo: true },
  'member.manage': { allow: manager, administratorToo: true },
  'equipment.read': { allow: everyMember, administratorToo: true },
  'equipment.write': { allow: bench },
  'recording.read': { allow: everyMember, administratorToo: true },
  'recording.upload': { allow: bench },
  'recording.update': { allow: bench },
  'recording.delete': { allow: bench },
  'reading-rule.read': { allow: everyMember, administratorToo: true },
  'reading-rule.write': { allow: bench },
  'analysis.read': { allow: everyMember, administratorToo: true },
  'analysis.run': { allow: bench },
  'note.read': { allow: everyMember, administratorToo: true },
  'note.write': { allow: bench },
  'limit-set.read': { allow: everyMember, administratorToo: true },
  'limit-set.write': { allow: analysis },
  'verdict.read': { allow: everyMember, administratorToo: true },
  'verdict.create': { allow: analysis },
  'study.read': { allow: everyMember, administratorToo: true },
  'study.write': { allow: analysis },
  'report.read': { allow: everyMember, administratorToo: true },
  'report.write': { allow: analysis },
  'report.submit': { allow: analysis },
  'report.decide': { allow: manager },
  'report.comment': { allow: bench },
  'report.check': { allow: 'public' },
  'delivery.read': { allow: bench, administratorToo: true },
  'delivery.send': { allow: manager },
  'mail.retry': { allow: manager, administratorToo: true },
} as const satisfies Record<
  string,
  {
    allow: 'public' | 'signed-in' | 'administrator' | 'laboratory' | readonly ProjectRole[];
    administratorToo?: boolean;
  }
>;
export type Permission = keyof typeof permissions;

/** Roles that make somebody one of the laboratory, whatever project they are held in. */
export const laboratoryRoles = bench;

/**
 * True when a member with `role` (null: not a member) holds a project permission. For a permission of the laboratory
 * `role` is one of `laboratoryRoles` that the person holds in any project.
 */
export function holds(permission: Permission, role: ProjectRole | null, isAdministrator = false): boolean {
  const entry: { allow: string | readonly ProjectRole[]; administratorToo?: boolean } =
    permissions[permission];
  if (entry.allow === 'public' || entry.allow === 'signed-in') return true;
  if (entry.allow === 'administrator') return isAdministrator;
  if (entry.allow === 'laboratory') return isAdministrator || (role !== null && bench.includes(role));
  if (entry.administratorToo && isAdministrator) return true;
  return role !== null && entry.allow.includes(role);
}
