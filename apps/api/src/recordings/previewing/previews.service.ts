import { Injectable } from '@nestjs/common';
import type { ImportOptions, ImportPreview } from '@overtally/contracts';
import { ComputePool } from '../../jobs/compute-pool.js';
import { chooseOptions } from '../../reading-rules/choose-options.js';
import type { ColumnsUnder } from '../../reading-rules/fitting-rule.js';
import { ReadingRulesService } from '../../reading-rules/reading-rules.service.js';
import type { PreviewFields } from '../dto/upload.dto.js';
import type { PreviewTaskInput, PreviewTaskResult } from './preview-task.js';

/** The reader finds the columns of a table in this much of its beginning. */
export const columnBytes = 128 * 1024;

/** A file whose beginning can be had. */
export interface BegunFile {
  fileName: string;
  sizeBytes: number;
  /** Its first bytes, `columnBytes` or all of them. */
  head: () => Promise<Uint8Array>;
}

/** Looks into the beginning of files in a thread of its own, so that requests are answered meanwhile. */
@Injectable()
export class PreviewsService {
  constructor(
    private readonly pool: ComputePool,
    private readonly rules: ReadingRulesService,
  ) {}

  /**
   * How a file would be read, judged by its beginning.
   * @throws 400 when `readingRuleId` names no rule of the project
   */
  async preview(projectId: string, head: Uint8Array, fields: PreviewFields): Promise<ImportPreview> {
    const { fileName, sizeBytes, readingRuleId } = fields;
    const stated = fields.import ?? {};
    const rules = await this.rules.candidates(projectId, { readingRuleId });
    const file = { fileName, sizeBytes, head: () => Promise.resolve(head.subarray(0, columnBytes)) };
    const chosen = await chooseOptions({ readingRuleId }, rules, fileName, this.columnsOf(file));
    const options = Object.keys(stated).length > 0 ? stated : chosen.options;
    const seen = await this.look({ head, fileName, sizeBytes, options });
    return { ...seen, readingRule: chosen.readingRule, options };
  }

  /** Tells the columns of a file under given options; reads its beginning once, and only when asked. */
  columnsOf({ head, ...file }: BegunFile): ColumnsUnder {
    let beginning: Promise<Uint8Array> | undefined;
    const known = new Map<string, Promise<string[]>>();
    const namesUnder = async (options: ImportOptions): Promise<string[]> => {
      beginning ??= head();
      const { columns } = await this.look({ ...file, head: await beginning, options });
      return columns.map(({ name }) => name);
    };
    return ({ delimiter, decimal, headerRows }) => {
      // Nothing else of the options decides on where the columns are and what they are called.
      const options: ImportOptions = {
        ...(delimiter !== undefined && { delimiter }),
        ...(decimal !== undefined && { decimal }),
        ...(headerRows !== undefined && { headerRows }),
      };
      const key = JSON.stringify(options);
      const names = known.get(key) ?? namesUnder(options);
      known.set(key, names);
      return names;
    };
  }

  private look(input: PreviewTaskInput): Promise<PreviewTaskResult> {
    const stop = new AbortController().signal;
    return this.pool.run('preview', input, { stop, onProgress: () => undefined });
  }
}
