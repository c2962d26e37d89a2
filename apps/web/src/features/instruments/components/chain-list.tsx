import { Box, Button, Flex, Heading, Link, Stack, Text } from '@chakra-ui/react';
import type { MeasuringChainListItem } from '@overtally/contracts';
import { Link as RouterLink } from 'react-router-dom';
import { CalibrationMark } from '../../../components/calibration-mark.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { Sheet } from '../../../components/sheet.js';
import { standingOf } from '../../../lib/calibration-words.js';
import { useLaboratoryChanges } from '../hooks/use-laboratory-changes.js';
import { dueWords } from '../instrument-words.js';

interface ChainListProps {
  chains: readonly MeasuringChainListItem[];
  instrumentTo: (instrumentId: string) => string;
  now: Date;
  onEdit: (chain: MeasuringChainListItem, copies: boolean) => void;
  onDelete: (chain: MeasuringChainListItem) => void;
}

/** Measuring chains with each instrument's calibration. */
export function ChainList({ chains, instrumentTo, now, onEdit, onDelete }: ChainListProps) {
  const { changeChain } = useLaboratoryChanges();
  const retire = ({ id, name, retiredAt }: MeasuringChainListItem) =>
    changeChain.mutate(
      { id, change: { retired: retiredAt === null } },
      {
        onSuccess: () => notifyDone(retiredAt ? `${name} is in use again` : `${name} retired`),
        onError: (error) => notifyProblem(`${name} not changed`, error),
      },
    );
  return (
    <Stack as="ul" gap="3" listStyleType="none">
      {chains.map((chain) => (
        <li key={chain.id}>
          <Sheet p="4">
            <Flex justify="space-between" gap="3" wrap="wrap" mb="2">
              <Box minW="0">
                <Heading as="h2" fontSize="md" overflowWrap="anywhere">
                  {chain.name}
                  {chain.retiredAt ? ' (retired)' : ''}
                </Heading>
                <CalibrationMark standing={chain.calibrationState} />
              </Box>
              <Flex gap="2" wrap="wrap" align="flex-start">
                <Button size="sm" aria-label={`Edit ${chain.name}`} onClick={() => onEdit(chain, false)}>
                  Edit
                </Button>
                <Button size="sm" aria-label={`Copy ${chain.name}`} onClick={() => onEdit(chain, true)}>
                  Copy
                </Button>
                <Button
                  size="sm"
                  aria-label={`${chain.retiredAt ? 'Use again' : 'Retire'} ${chain.name}`}
                  onClick={() => retire(chain)}
                >
                  {chain.retiredAt ? 'Use again' : 'Retire'}
                </Button>
                {chain.recordings === 0 ? (
                  <Button size="sm" aria-label={`Delete ${chain.name}`} onClick={() => onDelete(chain)}>
                    Delete
                  </Button>
                ) : null}
              </Flex>
            </Flex>
            {chain.description ? (
              <Text color="inkSoft" mb="2">
                {chain.description}
              </Text>
            ) : null}
            <Stack as="ol" gap="1" ps="5">
              {chain.instruments.map((instrument) => (
                <li key={instrument.id}>
                  <Flex display="inline-flex" columnGap="3" wrap="wrap">
                    <Link asChild>
                      <RouterLink to={instrumentTo(instrument.id)}>{instrument.name}</RouterLink>
                    </Link>
                    <CalibrationMark standing={standingOf(instrument, now)} />
                    <Text color="inkSoft" fontSize="13px" as="span">
                      {dueWords(instrument)}
                    </Text>
                  </Flex>
                </li>
              ))}
            </Stack>
            <Text color="inkSoft" fontSize="13px" mt="2">
              {chain.recordings === 1 ? '1 recording' : `${chain.recordings} recordings`} made through it
            </Text>
          </Sheet>
        </li>
      ))}
    </Stack>
  );
}
