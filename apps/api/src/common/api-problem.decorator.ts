import { ApiExtraModels, ApiResponse, getSchemaPath } from '@nestjs/swagger';
import { applyDecorators } from '@nestjs/common';
import { problemDetailsSchema } from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class ProblemDto extends createZodDto(problemDetailsSchema) {}

/** Documents a problem reply (application/problem+json) of a route. */
export function ApiProblem(status: number | 'default', description: string): MethodDecorator {
  return applyDecorators(
    ApiExtraModels(ProblemDto),
    ApiResponse({
      status,
      description,
      content: { 'application/problem+json': { schema: { $ref: getSchemaPath(ProblemDto) } } },
    }),
  );
}
