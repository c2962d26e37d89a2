import { projectRoleSchema, type ProjectRole } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { newPerson, newProject, type Person } from './factories.js';

/** Who stands in a test: one member of each role, one outside, one administrator who is no member. */
export type Role = ProjectRole | 'stranger' | 'administrator';

export const ROLES: readonly Role[] = [...projectRoleSchema.options, 'stranger', 'administrator'];

export type People = Record<Role, Person>;

/** Makes the people and a project whose members they are. */
export async function seedPeople(database: Database): Promise<{ people: People; project: { id: string } }> {
  const entries = await Promise.all(
    ROLES.map(async (role) => [
      role,
      await newPerson(database, {
        name: role[0]?.toUpperCase() + role.slice(1),
        email: `${role}@example.com`,
        isAdministrator: role === 'administrator',
      }),
    ]),
  );
  const people = Object.fromEntries(entries) as People;
  const project = await newProject(database, {
    members: Object.fromEntries(projectRoleSchema.options.map((role) => [people[role].id, role])),
  });
  return { people, project };
}
