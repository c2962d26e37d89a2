import { Box, Link, Text } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { useQuery } from '@tanstack/react-query';
import { Link as RouterLink } from 'react-router-dom';
import { formatDateTime } from '../../../lib/format-date.js';
import { limitSetVersionsQuery } from '../api/list-limit-set-versions.js';

interface LimitSetVersionsProps {
  set: LimitSet;
  setTo: (limitSetId: string) => string;
}

/** Which version of a custom set is shown, the way to the others, and whether it is retired. */
export function LimitSetVersions({ set, setTo }: LimitSetVersionsProps) {
  const versions = useQuery({ ...limitSetVersionsQuery(set.id), enabled: set.projectId !== null });
  const others = versions.data?.filter(({ id }) => id !== set.id) ?? [];
  if (set.projectId === null || (others.length === 0 && set.retiredAt === undefined)) return null;
  const isEarlier = set.newestId !== undefined;
  return (
    <Box
      as="section"
      aria-label="Versions"
      mb="4"
      borderLeftWidth="3px"
      borderColor={isEarlier || set.retiredAt ? 'near' : 'rule'}
      pl="3"
    >
      {set.retiredAt ? (
        <Text color="near">Retired {formatDateTime(set.retiredAt)}: not offered for new verdicts.</Text>
      ) : null}
      {others.length > 0 ? (
        <Text color={isEarlier ? 'near' : undefined}>
          {isEarlier
            ? `This is version ${set.version}, not the newest. `
            : `This is version ${set.version}, the newest. `}
          {others.map(({ id, version }, index) => (
            <Text as="span" key={id}>
              {index > 0 ? ', ' : 'Others: '}
              <Link asChild>
                <RouterLink to={setTo(id)}>version {version}</RouterLink>
              </Link>
            </Text>
          ))}
          .
        </Text>
      ) : null}
    </Box>
  );
}
