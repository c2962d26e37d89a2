import { Injectable } from '@nestjs/common';
import type { Analysis, Note, ReportContent, ReportSection, Verdict } from '@overtally/contracts';
import { AnalysesService } from '../analyses/analyses.service.js';
import { EquipmentService } from '../equipment/equipment.service.js';
import { ChainsService } from '../instruments/chains.service.js';
import { LaboratoryService } from '../laboratory/laboratory.service.js';
import { VerdictsService } from '../limits/verdicts.service.js';
import { ReportedStudies } from '../studies/reported-studies.service.js';
import { NotesService } from '../notes/notes.service.js';
import { RecordingsService } from '../recordings/recordings.service.js';
import { ReportPictures } from './report-pictures.service.js';
import { worstResult } from './report-state.js';

const notesPerQuery = 200;

/** Gathers what a report says from what is stored; computes nothing anew. */
@Injectable()
export class ReportContentService {
  constructor(
    private readonly verdicts: VerdictsService,
    private readonly recordings: RecordingsService,
    private readonly analyses: AnalysesService,
    private readonly notes: NotesService,
    private readonly pictures: ReportPictures,
    private readonly equipment: EquipmentService,
    private readonly chains: ChainsService,
    private readonly laboratory: LaboratoryService,
    private readonly studies: ReportedStudies,
  ) {}

  /** The content as of now, one section per verdict and one study per version in the order given. */
  async gather(
    head: Pick<ReportContent, 'project' | 'revisionReason'>,
    verdictIds: readonly string[],
    studyVersionIds: readonly string[],
  ): Promise<ReportContent> {
    const verdicts = await this.verdicts.ofProject(head.project.id, verdictIds);
    const sections: ReportSection[] = [];
    for (const verdict of verdicts) {
      if (verdict) sections.push(await this.section(verdict));
    }
    return {
      ...head,
      laboratory: await this.laboratory.get(),
      sections,
      studies: await this.studies.ofProject(head.project.id, studyVersionIds),
      result: worstResult(sections.map((section) => section.verdict.result)),
    };
  }

  private async notesOf(analysisId: string): Promise<Note[]> {
    const notes: Note[] = [];
    let cursor: string | undefined;
    do {
      const page = await this.notes.page(analysisId, { cursor, limit: notesPerQuery });
      notes.push(...page.items);
      cursor = page.nextCursor ?? undefined;
    } while (cursor !== undefined);
    return notes;
  }

  private async section(verdict: Verdict): Promise<ReportSection> {
    const [recording, analysis, notes] = await Promise.all([
      this.recordings.get(verdict.recordingId),
      this.analyses.get(verdict.analysisId),
      this.notesOf(verdict.analysisId),
    ]);
    const { id, number, name, eut, measuringChain, instrument, capturedAt, file } = recording;
    const chainId =
      recording.channels.find(({ index }) => index === verdict.channel)?.chain?.id ?? recording.chain?.id;
    const moment = new Date(recording.capturedAt ?? recording.createdAt);
    const { sampleRateHz, sampleCount, durationS, metadata } = recording;
    const { recordingId, analysisId } = verdict;
    const judged = analysisPart(analysis, verdict.channel);
    return {
      verdict,
      recording: {
        ...{ id, number, name, eut, measuringChain, instrument, capturedAt, file },
        ...{ sampleRateHz, sampleCount, durationS, metadata, import: recording.import },
      },
      analysis: judged,
      notes: notes.filter((note) => note.channel === verdict.channel),
      ...(await this.equipment.ofRecording(recording.id)),
      chain: chainId === undefined ? null : await this.chains.chainAt(chainId, moment),
      conditions: recording.conditions,
      ...(await this.pictures.of({ recordingId, analysisId, ...judged })),
    };
  }
}

function analysisPart(analysis: Analysis, index: number): ReportSection['analysis'] {
  const { id, engineVersion, finishedAt, settings } = analysis;
  const channel = analysis.channels.find((each) => each.index === index);
  if (!channel) throw new Error(`Analysis ${id} has lost channel ${index}`);
  return { id, engineVersion, finishedAt, settings, channel };
}
