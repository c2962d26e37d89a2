import type { ProjectRole } from '@overtally/contracts';
import { schema, type Database } from '@overtally/db';
import argon2 from 'argon2';
import { randomUUID } from 'node:crypto';

/** Password of everyone the factories make. */
export const PASSWORD = 'a password for tests';

let passwordHash: Promise<string> | undefined;

export type Person = Pick<typeof schema.users.$inferSelect, 'id' | 'email' | 'name' | 'isAdministrator'>;

/** A person with an account and the password of the tests. */
export async function newPerson(
  database: Database,
  person: Partial<Omit<Person, 'id'>> = {},
): Promise<Person> {
  passwordHash ??= argon2.hash(PASSWORD, { memoryCost: 19 * 1024, timeCost: 2, parallelism: 1 });
  const email = person.email ?? `${randomUUID()}@example.com`;
  const [row] = await database
    .insert(schema.users)
    .values({ name: 'Someone', ...person, email, passwordHash: await passwordHash })
    .returning();
  return made(row);
}

/** A project with members given as person id to role; without members one manager is made for it. */
export async function newProject(
  database: Database,
  { members, name = 'Rectifier' }: { members?: Record<string, ProjectRole>; name?: string } = {},
) {
  const people = members ?? { [(await newPerson(database)).id]: 'manager' as const };
  const [createdById] = Object.keys(people);
  if (createdById === undefined) throw new Error('A project needs a member');
  const defaultSettings = { profile: 'mains', nominalFrequencyHz: 'auto' } as const;
  const [row] = await database
    .insert(schema.projects)
    .values({ name, createdById, defaultSettings })
    .returning();
  const project = made(row);
  const rows = Object.entries(people).map(([userId, role]) => ({ projectId: project.id, userId, role }));
  await database.insert(schema.members).values(rows);
  return project;
}

/** The row an insert returned. */
export function made<Row>(row: Row | undefined): Row {
  if (row === undefined) throw new Error('The database returned no row after an insert');
  return row;
}
