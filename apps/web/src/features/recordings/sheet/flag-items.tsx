import type { Flag, ReadWarning } from '@overtally/contracts';
import { Text } from '@chakra-ui/react';
import { MarginItem } from '../../../components/margin-column.js';
import { codeTitle, severity } from './flag-words.js';

const rank: Record<Flag['severity'], number> = { error: 0, warning: 1, info: 2 };

/** What the engine found about a channel, the gravest first. */
export function FlagItems({ flags }: { flags: readonly Flag[] }) {
  const sorted = flags.toSorted((a, b) => rank[a.severity] - rank[b.severity]);
  return sorted.map((flag) => (
    <MarginItem
      key={`${flag.code} ${flag.message}`}
      tone={severity[flag.severity].tone}
      title={codeTitle(flag.code)}
      foot={severity[flag.severity].words}
    >
      <Text>{flag.message}</Text>
    </MarginItem>
  ));
}

/** What the reader noticed in the file. */
export function WarningItems({ warnings }: { warnings: readonly ReadWarning[] }) {
  return warnings.map((warning) => (
    <MarginItem
      key={`${warning.code} ${warning.message}`}
      tone="near"
      title={codeTitle(warning.code)}
      foot={warningPlace(warning)}
    >
      <Text>{warning.message}</Text>
    </MarginItem>
  ));
}

function warningPlace({ firstLine }: ReadWarning): string {
  const parts = ['from reading the file'];
  if (firstLine !== undefined) parts.push(`first in line ${firstLine}`);
  return parts.join(', ');
}
