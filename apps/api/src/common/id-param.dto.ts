import { idSchema } from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';
import { z } from 'zod';

/** Path with one id, for things that are not in a project; those are checked by the access guard. */
export class IdParam extends createZodDto(z.object({ id: idSchema })) {}
