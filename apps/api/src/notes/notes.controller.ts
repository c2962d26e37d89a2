import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiNoContentResponse, ApiOperation, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import {
  ProjectAccess,
  RequirePermission,
  type ProjectAccessValue,
} from '../access/require-permission.decorator.js';
import { CurrentUser, type SignedInUser } from '../common/current-user.decorator.js';
import { CreateNoteDto, NoteDto, NotePageDto, NotesQueryDto, UpdateNoteDto } from './dto/note.dto.js';
import { NotesService } from './notes.service.js';

@ApiTags('notes')
@Controller()
export class NotesController {
  constructor(private readonly notes: NotesService) {}

  @Get('analyses/:id/notes')
  @RequirePermission('note.read', { resource: 'analysis' })
  @ApiOperation({ summary: 'Notes on an analysis, the oldest first' })
  @ZodResponse({ status: 200, type: NotePageDto })
  list(@Param('id') analysisId: string, @Query() query: NotesQueryDto) {
    return this.notes.page(analysisId, query);
  }

  @Post('analyses/:id/notes')
  @RequirePermission('note.write', { resource: 'analysis' })
  @ApiOperation({ summary: 'Note something on an order, a line or a time span' })
  @ZodResponse({ status: 201, type: NoteDto })
  create(@Param('id') analysisId: string, @CurrentUser() user: SignedInUser, @Body() note: CreateNoteDto) {
    return this.notes.create(analysisId, user.id, note);
  }

  @Patch('notes/:id')
  @RequirePermission('note.write', { resource: 'note' })
  @ApiOperation({ summary: 'Change a note; its author or a manager may' })
  @ZodResponse({ status: 200, type: NoteDto })
  update(
    @Param('id') id: string,
    @CurrentUser() user: SignedInUser,
    @ProjectAccess() { role }: ProjectAccessValue,
    @Body() change: UpdateNoteDto,
  ) {
    return this.notes.update(id, { userId: user.id, role }, change);
  }

  @Delete('notes/:id')
  @HttpCode(204)
  @RequirePermission('note.write', { resource: 'note' })
  @ApiNoContentResponse({ description: 'Deleted' })
  @ApiOperation({ summary: 'Delete a note; its author or a manager may' })
  async delete(
    @Param('id') id: string,
    @CurrentUser() user: SignedInUser,
    @ProjectAccess() { role }: ProjectAccessValue,
  ): Promise<void> {
    await this.notes.delete(id, { userId: user.id, role });
  }
}
