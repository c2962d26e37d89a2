import { Box, Button, Table, Text } from '@chakra-ui/react';
import type { Mail } from '@overtally/contracts';
import { Link } from 'react-router-dom';
import { MailStanding } from '../../../components/mail-standing.js';
import { Sheet } from '../../../components/sheet.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { kindWords } from '../mail-words.js';

interface MailListProps {
  mails: readonly Mail[];
  /** Address of a message's page. */
  addressOf: (mailId: string) => string;
  hasMore: boolean;
  isLoadingMore: boolean;
  onMore: () => void;
}

/** Messages with how they fared, the newest first. */
export function MailList({ mails, addressOf, hasMore, isLoadingMore, onMore }: MailListProps) {
  return (
    <>
      <Sheet overflowX="auto">
        <Table.Root>
          <Table.Caption srOnly>Messages</Table.Caption>
          <Table.Header>
            <Table.Row>
              <Table.ColumnHeader scope="col">Message</Table.ColumnHeader>
              <Table.ColumnHeader scope="col" hideBelow="md">
                To
              </Table.ColumnHeader>
              <Table.ColumnHeader scope="col" hideBelow="lg">
                Written
              </Table.ColumnHeader>
              <Table.ColumnHeader scope="col">Standing</Table.ColumnHeader>
            </Table.Row>
          </Table.Header>
          <Table.Body>
            {mails.map((mail) => (
              <Table.Row key={mail.id}>
                <Table.Cell verticalAlign="top">
                  <Box asChild color="act" overflowWrap="anywhere">
                    <Link to={addressOf(mail.id)}>{mail.subject}</Link>
                  </Box>
                  <Text color="inkSoft" fontSize="13px" overflowWrap="anywhere">
                    {kindWords[mail.kind]}
                    {mail.attachments.length > 0 ? ', with PDF' : ''}
                    <Box as="span" hideFrom="md">
                      {' '}
                      to {mail.to.email}
                    </Box>
                  </Text>
                </Table.Cell>
                <Table.Cell hideBelow="md" verticalAlign="top" overflowWrap="anywhere">
                  {mail.to.email}
                </Table.Cell>
                <Table.Cell hideBelow="lg" verticalAlign="top" color="inkSoft" whiteSpace="nowrap">
                  {formatDateTime(mail.createdAt)}
                </Table.Cell>
                <Table.Cell verticalAlign="top">
                  <MailStanding mail={mail} />
                </Table.Cell>
              </Table.Row>
            ))}
          </Table.Body>
        </Table.Root>
      </Sheet>
      {hasMore ? (
        <Button mt="3" loading={isLoadingMore} onClick={onMore}>
          Older messages
        </Button>
      ) : null}
    </>
  );
}
