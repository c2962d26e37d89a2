import { Link, Table, Text } from '@chakra-ui/react';
import type { StudyListItem, VerdictResult } from '@overtally/contracts';
import { Link as RouterLink } from 'react-router-dom';
import { ResultWords } from '../../../components/verdict/result-words.js';
import { none } from '../../../lib/format.js';
import { formatDate } from '../../../lib/format-date.js';

const stabilityWords: Record<StudyListItem['stability'], string> = {
  stable: 'Stable',
  marginal: 'On the edge',
  unstable: 'Unstable',
};

/** Studies of a project with what they predict. */
export function StudyTable({
  studies,
  studyTo,
}: {
  studies: readonly StudyListItem[];
  studyTo: (id: string) => string;
}) {
  return (
    <Table.ScrollArea>
      <Table.Root>
        <Table.Caption srOnly>Studies of the project</Table.Caption>
        <Table.Header>
          <Table.Row>
            {['Number', 'Study', 'Stages', 'Before', 'Predicted', 'Version', 'Saved'].map((word) => (
              <Table.ColumnHeader key={word} scope="col">
                {word}
              </Table.ColumnHeader>
            ))}
          </Table.Row>
        </Table.Header>
        <Table.Body>
          {studies.map((study) => (
            <Table.Row key={study.id}>
              <Table.Cell fontFamily="mono" fontSize="13px" whiteSpace="nowrap">
                {study.number}
              </Table.Cell>
              <Table.Cell minW="48">
                <Link asChild fontWeight="600">
                  <RouterLink to={studyTo(study.id)}>{study.name}</RouterLink>
                </Link>
                {study.retiredAt ? (
                  <Text fontSize="xs" color="inkSoft">
                    retired
                  </Text>
                ) : null}
              </Table.Cell>
              <Table.Cell color={study.stability === 'stable' ? undefined : 'over'} whiteSpace="nowrap">
                {stabilityWords[study.stability]}
              </Table.Cell>
              <Table.Cell>
                <Result result={study.resultBefore} />
              </Table.Cell>
              <Table.Cell>
                <Result result={study.resultAfter} />
              </Table.Cell>
              <Table.Cell fontFamily="mono">{study.version}</Table.Cell>
              <Table.Cell whiteSpace="nowrap" color="inkSoft">
                {`${formatDate(study.savedAt)}, ${study.author.name}`}
              </Table.Cell>
            </Table.Row>
          ))}
        </Table.Body>
      </Table.Root>
    </Table.ScrollArea>
  );
}

const Result = ({ result }: { result: VerdictResult | null }) =>
  result === null ? none : <ResultWords result={result} />;
