import { Stack, Text } from '@chakra-ui/react';
import type { Verdict } from '@overtally/contracts';
import { formatDateTime } from '../../../lib/format-date.js';
import { limitSetName } from '../../../lib/limit-set-name.js';
import { parameterLine } from '../../../components/verdict/parameter-line.js';
import { RepeatsView } from '../../../components/verdict/repeats-view.js';
import { SupplyView } from '../../../components/verdict/supply-view.js';
import { SetSource } from './set-source.js';
import { Judgement } from './judgement.js';

/** A stored verdict: the set, the rule, the parameters, the result and its numbers. */
export function VerdictView({ verdict, subject }: { verdict: Verdict; subject: string }) {
  const { limitSet, channelName, unit } = verdict;
  const name = limitSetName(limitSet);
  return (
    <Stack gap="3">
      <Text>
        {channelName} against {name}
        {limitSet.projectId === null ? '' : `, version ${limitSet.version}`}.
      </Text>
      <Judgement
        preview={false}
        caption={`${verdict.author.name}, ${formatDateTime(verdict.createdAt)}`}
        subject={`${name}, ${subject}, ${channelName}`}
        unit={unit}
        fileName={`${subject}-${channelName}-verdict`}
        judgement={verdict}
      />
      <Text color="inkSoft" fontSize="13px">
        {verdict.decisionRuleText} {parameterLine(verdict.parameters)}
      </Text>
      {verdict.supply ? (
        <SupplyView supply={verdict.supply} fileName={`${subject}-${channelName}-supply`} />
      ) : null}
      <RepeatsView repeats={verdict.repeats} />
      <SetSource set={limitSet} />
    </Stack>
  );
}
