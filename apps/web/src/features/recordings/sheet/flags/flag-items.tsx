import { Text } from '@chakra-ui/react';
import type { Flag, FlagEvidence, ReadWarning } from '@overtally/contracts';
import { MarginItem } from '../../../../components/margin-column.js';
import { Evidence } from './evidence.js';
import { codeTitle, severity } from './flag-words.js';

const rank: Record<Flag['severity'], number> = { error: 0, warning: 1, info: 2 };

interface FlagItemsProps {
  flags: readonly Flag[];
  /** Where the analysed span begins in the record: the times of flags count from there. */
  fromS: number;
  onTime: (timeS: number) => void;
}

/** What the engine found about a channel, the gravest first, with its evidence. */
export function FlagItems({ flags, fromS, onTime }: FlagItemsProps) {
  const sorted = flags.toSorted((a, b) => rank[a.severity] - rank[b.severity]);
  return sorted.map((flag) => (
    <MarginItem
      key={`${flag.code} ${flag.message}`}
      tone={severity[flag.severity].tone}
      title={codeTitle(flag.code)}
      aside={severity[flag.severity].words}
    >
      <Text>{flag.message}</Text>
      {flag.evidence ? <Evidence evidence={inRecord(flag.evidence, fromS)} onTime={onTime} /> : null}
    </MarginItem>
  ));
}

const inRecord = (evidence: FlagEvidence, fromS: number): FlagEvidence => ({
  ...evidence,
  timesS: evidence.timesS.map((timeS) => fromS + timeS),
});

interface WarningItemsProps {
  warnings: readonly ReadWarning[];
  sampleRateHz: number | null;
  onTime: (timeS: number) => void;
}

/** What the reader noticed in the file, with the places it noticed it at. */
export function WarningItems({ warnings, sampleRateHz, onTime }: WarningItemsProps) {
  return warnings.map((warning) => (
    <MarginItem
      key={`${warning.code} ${warning.message}`}
      tone="near"
      title={codeTitle(warning.code)}
      foot={warningPlace(warning)}
    >
      <Text>{warning.message}</Text>
      <Evidence evidence={evidenceOf(warning, sampleRateHz)} onTime={onTime} />
    </MarginItem>
  ));
}

function evidenceOf(warning: ReadWarning, sampleRateHz: number | null): FlagEvidence {
  const { count, samples = [], value = null, limit = null, unit = null } = warning;
  const timesS = sampleRateHz ? samples.map((sample) => sample / sampleRateHz) : [];
  return { count: count ?? timesS.length, timesS, value, limit, unit };
}

function warningPlace({ firstLine }: ReadWarning): string {
  const parts = ['from reading the file'];
  if (firstLine !== undefined) parts.push(`first in line ${firstLine}`);
  return parts.join(', ');
}
