import { describe, expect, it } from 'vitest';
import { holds, permissions, projectRoleSchema, type Permission } from './access.js';

/** The duties below are the job table of a test laboratory (technician, analyst, manager, guest). */
describe('who may do what', () => {
  it('lets only a manager decide on a report', () => {
    const deciders = projectRoleSchema.options.filter((role) => holds('report.decide', role));
    expect(deciders).toEqual(['manager']);
  });

  it('lets a technician bring captures in and leaves the verdict to the analyst', () => {
    expect(holds('recording.upload', 'technician')).toBe(true);
    expect(holds('verdict.create', 'technician')).toBe(false);
  });

  it('gives a guest nothing but reading', () => {
    const held = (Object.keys(permissions) as Permission[]).filter(
      (permission) => Array.isArray(permissions[permission].allow) && holds(permission, 'guest'),
    );
    expect(held.every((permission) => /\.(read|list)$/.test(permission))).toBe(true);
  });

  it('shares instruments with whoever works in the laboratory, and with no customer', () => {
    const readers = projectRoleSchema.options.filter((role) => holds('instrument.read', role));
    expect(readers).toEqual(['technician', 'analyst', 'manager']);
    expect(holds('instrument.write', null)).toBe(false);
    expect(holds('instrument.write', null, true)).toBe(true);
  });

  it('gives a stranger nothing in a project, and an administrator reading, members and the messages of the mailbox only', () => {
    const inProject = (Object.keys(permissions) as Permission[]).filter((permission) =>
      Array.isArray(permissions[permission].allow),
    );
    expect(inProject.filter((permission) => holds(permission, null))).toEqual([]);
    expect(
      inProject.filter((permission) => holds(permission, null, true) && !/\.(read|list)$/.test(permission)),
    ).toEqual(['member.manage', 'mail.retry']);
  });
});
