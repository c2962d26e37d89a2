import {
  addMemberSchema,
  createProjectSchema,
  idSchema,
  memberPageSchema,
  memberSchema,
  pageQuerySchema,
  projectPageSchema,
  projectQuerySchema,
  projectSchema,
  updateMemberSchema,
  updateProjectSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';
import { z } from 'zod';

export class ProjectDto extends createZodDto(projectSchema) {}
export class ProjectPageDto extends createZodDto(projectPageSchema) {}
export class ProjectQueryDto extends createZodDto(projectQuerySchema) {}
export class CreateProjectDto extends createZodDto(createProjectSchema) {}
export class UpdateProjectDto extends createZodDto(updateProjectSchema) {}

export class MemberParams extends createZodDto(z.object({ id: idSchema, userId: idSchema })) {}
export class MemberDto extends createZodDto(memberSchema) {}
export class MemberPageDto extends createZodDto(memberPageSchema) {}
export class MemberQueryDto extends createZodDto(pageQuerySchema) {}
export class AddMemberDto extends createZodDto(addMemberSchema) {}
export class UpdateMemberDto extends createZodDto(updateMemberSchema) {}
