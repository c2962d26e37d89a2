import { Inject, Injectable } from '@nestjs/common';
import type { CreateNote, Note, ProjectRole, UpdateNote } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { z } from 'zod';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import { DATABASE } from '../database/database.tokens.js';
import { NotesRepository, toNote } from './notes.repository.js';

const cursorShape = z.tuple([z.iso.datetime(), z.uuid()]);

/** Who asks to change a note. */
export interface NoteEditor {
  userId: string;
  role: ProjectRole | null;
}

/** Notes on the orders, lines and time spans of an analysis. */
@Injectable()
export class NotesService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: NotesRepository,
  ) {}

  /** Notes of an analysis, the oldest first. */
  async page(analysisId: string, { cursor, limit }: { cursor?: string; limit: number }) {
    const place = decodeCursor(cursor, cursorShape);
    const after = place && { createdAt: place[0], id: place[1] };
    const rows = await this.repository.page(analysisId, limit + 1, after);
    return pageOfRows(rows, limit, (row) => [row.createdAt.toISOString(), row.id], toNote);
  }

  /** All notes of an analysis, the oldest first. */
  async ofAnalysis(analysisId: string): Promise<Note[]> {
    return (await this.repository.ofAnalysis(analysisId)).map(toNote);
  }

  async create(analysisId: string, authorId: string, note: CreateNote): Promise<Note> {
    if (!(await this.repository.hasChannel(analysisId, note.channel))) {
      const message = `The analysis has no channel ${note.channel}`;
      throw problem(400, 'invalid-request', message, [{ path: 'channel', message }]);
    }
    if (note.target.kind === 'span' && note.target.toS <= note.target.fromS) {
      const message = 'The span must end after it begins';
      throw problem(400, 'invalid-request', message, [{ path: 'target.toS', message }]);
    }
    const id = await this.database.transaction((tx) =>
      this.repository.insert(tx, analysisId, authorId, note),
    );
    return this.get(id);
  }

  async update(id: string, editor: NoteEditor, change: UpdateNote): Promise<Note> {
    await this.checkEditor(id, editor);
    await this.database.transaction((tx) => this.repository.update(tx, id, change));
    return this.get(id);
  }

  async delete(id: string, editor: NoteEditor): Promise<void> {
    await this.checkEditor(id, editor);
    await this.database.transaction((tx) => this.repository.delete(tx, id));
  }

  private async get(id: string): Promise<Note> {
    const row = await this.repository.find(id);
    if (row === undefined) throw problem(404, 'not-found', 'There is no such note');
    return toNote(row);
  }

  private async checkEditor(id: string, { userId, role }: NoteEditor): Promise<void> {
    const { author } = await this.get(id);
    if (author.id !== userId && role !== 'manager') {
      throw problem(403, 'not-the-author', 'Only its author or a manager may change a note');
    }
  }
}
