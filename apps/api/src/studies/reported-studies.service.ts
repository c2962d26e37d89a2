import { Injectable } from '@nestjs/common';
import type { ReportStudy, StudyDefinition } from '@overtally/contracts';
import { AnalysesService } from '../analyses/analyses.service.js';
import { problem } from '../common/problem.js';
import { LimitSetsService } from '../limits/limit-sets.service.js';
import { RecordingsService } from '../recordings/recordings.service.js';
import { reportStudy } from './report-study.js';
import { StudiesService } from './studies.service.js';

/** Studies as reports show them. */
@Injectable()
export class ReportedStudies {
  constructor(
    private readonly studies: StudiesService,
    private readonly analyses: AnalysesService,
    private readonly recordings: RecordingsService,
    private readonly limitSets: LimitSetsService,
  ) {}

  /** Versions of a project's studies, in the order of their ids, with all that a report says of them. */
  async ofProject(projectId: string, versionIds: readonly string[]): Promise<ReportStudy[]> {
    const made: ReportStudy[] = [];
    for (const row of await this.studies.versionsOfProject(projectId, versionIds)) {
      if (!row) continue;
      const { judgement, input } = row.definition;
      const set = judgement && (await this.limitSets.resolve(projectId, judgement.limitSetId));
      const limitSet = judgement && { id: judgement.limitSetId, title: set?.title ?? judgement.limitSetId };
      made.push(reportStudy(row, limitSet, await this.source(input, row.definition)));
    }
    return made;
  }

  /** @throws 422 naming the place of each version that the project does not have */
  async require(projectId: string, versionIds: readonly string[]): Promise<void> {
    const found = await this.studies.versionsOfProject(projectId, versionIds);
    const errors = found.flatMap((version, index) =>
      version
        ? []
        : [{ path: `studyVersionIds.${index}`, message: 'The project has no such version of a study' }],
    );
    if (errors.length === 0) return;
    throw problem(422, 'study-unknown', 'A report shows studies of its own project; see errors', errors);
  }

  private async source(
    input: StudyDefinition['input'],
    { inputUnit }: StudyDefinition,
  ): Promise<ReportStudy['source']> {
    const none = { recordingId: null, analysisId: null };
    if (input.kind === 'wave') {
      const { shape, amplitude, frequencyHz, dutyPercent, maxOrder } = input;
      const duty = shape === 'pulse' ? `, duty ${dutyPercent ?? 50} %` : '';
      const words = `Textbook wave, not measured: ${shape}, amplitude ${amplitude} ${inputUnit}`.trimEnd();
      return { ...none, words: `${words}, ${frequencyHz} Hz${duty}, orders up to ${maxOrder}` };
    }
    if (input.kind === 'harmonics') {
      const { frequencyHz, components } = input.series;
      const orders = `${components.length} order${components.length === 1 ? '' : 's'}`;
      return {
        ...none,
        words: `Harmonics as they were entered, not measured: ${orders} of ${frequencyHz} Hz`,
      };
    }
    const analysis = await this.analyses.find(input.analysisId);
    if (!analysis) return { ...none, words: 'A measured channel whose analysis was deleted since' };
    const { number, name } = await this.recordings.get(analysis.recordingId);
    const channel =
      analysis.channels.find(({ index }) => index === input.channel)?.name ?? `channel ${input.channel}`;
    return {
      ...{ recordingId: analysis.recordingId, analysisId: analysis.id },
      words: `Measured: ${number} ${name}, ${channel}; single lines of the orders with their phases`,
    };
  }
}
