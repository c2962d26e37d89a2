import { Inject, Injectable } from '@nestjs/common';
import type { CreateStudy, SaveStudy, Study, StudyQuery, UpdateStudy } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { isDeepStrictEqual } from 'node:util';
import { z } from 'zod';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { retirement } from '../common/retirement.js';
import { DATABASE } from '../database/database.tokens.js';
import { isKeptByReport, isReferredViolation } from '../database/referred-violation.js';
import { StudyComputing } from './computing/study-computing.service.js';
import { StudiesRepository, type StudyVersionRow } from './studies.repository.js';
import { toStudy, toStudyListItem } from './study-view.js';

const placeSchema = z.tuple([z.iso.datetime(), z.uuid()]);

/** Predictions of what stages do to a periodic signal, saved version by version. */
@Injectable()
export class StudiesService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: StudiesRepository,
    private readonly computing: StudyComputing,
  ) {}

  /** Studies of a project, the newest first. */
  async list(projectId: string, { q, cursor, limit }: StudyQuery) {
    const place = decodeCursor(cursor, placeSchema);
    const after = place && { createdAt: place[0], id: place[1] };
    const rows = await this.repository.page(projectId, q, after, limit + 1);
    return pageOfRows(rows, limit, (row) => [row.createdAt.toISOString(), row.id], toStudyListItem);
  }

  /** A study as of one of its versions, the newest when none is named. */
  async get(id: string, version?: number): Promise<Study> {
    const [row, found, versions] = await Promise.all([
      this.repository.find(id),
      this.version(id, version),
      this.repository.versionsOf(id),
    ]);
    if (!row) throw noSuchStudy();
    return toStudy(row, found, versions);
  }

  /** @throws 404 when the study has no such version */
  async version(id: string, version?: number): Promise<StudyVersionRow> {
    const found = await this.repository.version(id, version);
    if (found) return found;
    throw version === undefined
      ? noSuchStudy()
      : problem(404, 'no-such-version', `The study has no version ${version}`);
  }

  /** The versions of a project's studies with these ids, in their order; undefined where it has none. */
  async versionsOfProject(
    projectId: string,
    ids: readonly string[],
  ): Promise<(StudyVersionRow | undefined)[]> {
    const rows = await this.repository.versionsOfProject(projectId, ids);
    const byId = new Map(rows.map((row) => [row.id, row]));
    return ids.map((id) => byId.get(id));
  }

  /** @throws as `StudyComputing` */
  async create(user: SignedInUser, projectId: string, input: CreateStudy): Promise<Study> {
    const { name, definition, comment } = input;
    const series = await this.computing.seriesOf(projectId, definition);
    const result = await this.computing.resultOf(projectId, definition, series);
    const id = await this.database.transaction(async (tx) => {
      const studyId = await this.repository.insert(tx, projectId, name);
      const version = { studyId, version: 1, definition, series, result, comment, authorId: user.id };
      await this.repository.insertVersion(tx, version);
      return studyId;
    });
    return this.get(id);
  }

  /**
   * A new version; the earlier ones stay as they are. Where the input is that of the version it is based on, its harmonics
   * stay too, even if their analysis is gone by now.
   * @throws 409 for a version that is not the newest, and as `StudyComputing`
   */
  async addVersion(user: SignedInUser, projectId: string, id: string, input: SaveStudy): Promise<Study> {
    const { definition, comment, basedOn } = input;
    const earlier = await this.version(id);
    requireNewest(earlier.version, basedOn);
    const isSameInput = isDeepStrictEqual(earlier.definition.input, definition.input);
    const series = isSameInput ? earlier.series : await this.computing.seriesOf(projectId, definition);
    const result = await this.computing.resultOf(projectId, definition, series);
    await this.database.transaction(async (tx) => {
      const newest = await this.repository.lockNewest(tx, id);
      if (newest === undefined) throw noSuchStudy();
      requireNewest(newest, basedOn);
      const version = newest + 1;
      const row = { studyId: id, version, definition, series, result, comment, authorId: user.id };
      await this.repository.insertVersion(tx, row);
    });
    return this.get(id);
  }

  async update(id: string, { name, retired }: UpdateStudy): Promise<Study> {
    const row = await this.repository.find(id);
    if (!row) throw noSuchStudy();
    const change = { ...(name !== undefined && { name }), ...retirement(retired, row.retiredAt) };
    await this.database.transaction((tx) => this.repository.update(tx, id, change));
    return this.get(id);
  }

  /**
   * Deletes a study with its versions.
   * @throws 409 when a report speaks of one of them
   */
  async delete(id: string): Promise<void> {
    try {
      await this.database.transaction((tx) => this.repository.delete(tx, id));
    } catch (error) {
      if (!isReferredViolation(error)) throw error;
      throw isKeptByReport(error)
        ? problem(
            409,
            'in-issued-report',
            'A version of this study stands in an issued report and therefore stays; retire the study instead',
          )
        : problem(
            409,
            'in-report',
            'A version of this study stands in a report; take it out of that, or retire the study instead',
          );
    }
  }
}

function requireNewest(newest: number, basedOn: number): void {
  if (newest === basedOn) return;
  const detail = `Version ${newest} is the newest by now; look at it, then make your changes to that`;
  throw problem(409, 'study-changed', detail, [{ path: 'basedOn', message: `The newest is ${newest}` }]);
}

const noSuchStudy = () => problem(404, 'not-found', 'There is no such study');
