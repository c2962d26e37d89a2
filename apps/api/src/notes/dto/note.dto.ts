import {
  createNoteSchema,
  notePageSchema,
  noteSchema,
  pageQuerySchema,
  updateNoteSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class NoteDto extends createZodDto(noteSchema) {}
export class NotePageDto extends createZodDto(notePageSchema) {}
export class NotesQueryDto extends createZodDto(pageQuerySchema) {}
export class CreateNoteDto extends createZodDto(createNoteSchema) {}
export class UpdateNoteDto extends createZodDto(updateNoteSchema) {}
