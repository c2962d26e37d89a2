import type { ProjectRole } from '@overtally/contracts';
import type { Request } from 'express';

/** The person behind a request. */
export interface SignedInUser {
  id: string;
  email: string;
  name: string;
  isAdministrator: boolean;
}

/** The project a request works in; `role` is null for an administrator who is no member. */
export interface ProjectAccess {
  projectId: string;
  role: ProjectRole | null;
}

/** A request as it leaves the access guard. */
export type AppRequest = Request & { id?: string; user?: SignedInUser; access?: ProjectAccess };
