import { Box, Button, Flex, Text } from '@chakra-ui/react';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { SelectInput } from '../../../components/form-field.js';
import { useRuleChanges } from '../hooks/use-rule-changes.js';
import type { UsedReading } from './use-reading.js';

interface RuleLineProps {
  projectId: string;
  reading: UsedReading;
  /** False while the settings have a fault. */
  mayKeep: boolean;
}

/** Which reading rule the settings come from, and the way to another one. */
export function RuleLine({ projectId, reading, mayKeep }: RuleLineProps) {
  const { rule, storedRule, isChanged, rules } = reading;
  const listed = rules.data ?? [];
  if (!rule && listed.length === 0) return null;
  const isOwn = isChanged || (!storedRule && Object.keys(reading.options).length > 0);
  const choose = (value: string) => {
    if (value === 'own') reading.belongTo(null);
    else reading.readBy(listed.find(({ id }) => id === value) ?? null);
  };
  return (
    <Flex
      align="center"
      justify="space-between"
      wrap="wrap"
      columnGap="5"
      rowGap="2"
      borderTopWidth="1px"
      borderBottomWidth="1px"
      borderColor="rule"
      py="2"
    >
      <Text role="status">{words(reading)}</Text>
      <Flex align="center" gap="2" wrap="wrap">
        {isChanged && storedRule ? (
          <UpdateRule projectId={projectId} reading={reading} mayKeep={mayKeep} />
        ) : null}
        <Box as="label" display="flex" alignItems="center" gap="2" fontSize="13px" color="inkSoft">
          Settings from
          <SelectInput
            width="220px"
            options={[
              { value: 'none', label: 'the file alone' },
              ...listed.map(({ id, name }) => ({ value: id, label: `rule: ${name}` })),
              ...(isOwn || storedRule ? [{ value: 'own', label: 'this form' }] : []),
            ]}
            value={isOwn ? 'own' : (storedRule?.id ?? 'none')}
            onChange={(event) => choose(event.target.value)}
          />
        </Box>
      </Flex>
    </Flex>
  );
}

/** "Read by the rule “Bench scope, CSV”." */
function words({ rule, isChanged, isFound, options }: UsedReading) {
  if (!rule) {
    return Object.keys(options).length > 0 ? 'Read by the settings of this form.' : 'Read by no rule.';
  }
  const name = <strong>“{rule.name}”</strong>;
  if (rule.id === null) return <>Read by the rule {name}, which was deleted since.</>;
  if (isChanged) return <>Changed from the rule {name}.</>;
  return (
    <>
      Read by the rule {name}
      {isFound ? ', which fits this file.' : '.'}
    </>
  );
}

function UpdateRule({ projectId, reading, mayKeep }: RuleLineProps) {
  const { update } = useRuleChanges(projectId);
  const { storedRule, options } = reading;
  if (!storedRule) return null;
  return (
    <Button
      disabled={!mayKeep}
      loading={update.isPending}
      onClick={() =>
        update.mutate(
          { id: storedRule.id, change: { options } },
          {
            onSuccess: ({ name }) =>
              notifyDone(`“${name}” is updated; recordings read before stay as they are`),
            onError: (error) => notifyProblem('The rule was not updated', error),
          },
        )
      }
    >
      Update the rule
    </Button>
  );
}
