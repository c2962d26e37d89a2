import type { ReportContent, ReportSection } from '@overtally/contracts';
import { completed, type EarlierChannel } from '../analyses/completed-channel.js';

type Optional<T, K extends keyof T> = Omit<T, K> & Partial<Pick<T, K>>;
type Verdict = ReportSection['verdict'];

type EarlierVerdict = Optional<Omit<Verdict, 'limitSet'>, 'supply' | 'repeats' | 'repeatability'> & {
  limitSet: Optional<Verdict['limitSet'], 'version'>;
};

type EarlierSection = Optional<
  Omit<ReportSection, 'verdict' | 'analysis'>,
  'equipment' | 'operatingMode' | 'chain' | 'conditions' | 'waveform' | 'distortion'
> & {
  verdict: EarlierVerdict;
  analysis: Omit<ReportSection['analysis'], 'channel'> & { channel: EarlierChannel };
};

/** A report's content as some earlier version froze it: what was not known then is absent. */
export type EarlierContent = Optional<
  Omit<ReportContent, 'project' | 'sections'>,
  'laboratory' | 'revisionReason' | 'studies'
> & {
  project: Optional<ReportContent['project'], 'customerContact' | 'preparerMayIssue'>;
  sections: EarlierSection[];
};

/**
 * Frozen content with every field of today: empty or null where it was frozen before there was such a field. What
 * was frozen stays what it was; a rule on who issues did not exist then, so one person could prepare and issue.
 */
export function completedContent(content: EarlierContent): ReportContent {
  return {
    revisionReason: null,
    studies: [],
    laboratory: { name: '', address: '', contact: '', accreditation: '' },
    ...content,
    project: { customerContact: '', preparerMayIssue: true, ...content.project },
    sections: content.sections.map((section) => ({
      equipment: null,
      operatingMode: null,
      chain: null,
      conditions: {},
      waveform: null,
      distortion: null,
      ...section,
      verdict: {
        supply: null,
        repeats: [],
        repeatability: null,
        ...section.verdict,
        limitSet: { version: 1, ...section.verdict.limitSet },
      },
      analysis: { ...section.analysis, channel: completed(section.analysis.channel) },
    })),
  };
}
