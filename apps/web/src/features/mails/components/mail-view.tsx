import { Box, Button, chakra, Text } from '@chakra-ui/react';
import type { MailMessage } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { MailStanding } from '../../../components/mail-standing.js';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { Segmented } from '../../../components/segmented.js';
import { Sheet } from '../../../components/sheet.js';
import { TitleBlock } from '../../../components/title-block.js';
import { formatDateTimeFull } from '../../../lib/format-date.js';
import { apiUrl } from '../../../lib/http.js';
import { retryMail } from '../../../lib/retry-mail.js';

const forms = [
  { value: 'html', label: 'As it looks' },
  { value: 'text', label: 'Plain text' },
] as const;

/** A message as its reader gets it, with its head and what is attached. */
export function MailView({ mail }: { mail: MailMessage }) {
  const [form, setForm] = useState<'html' | 'text'>('html');
  const { from, to, createdAt, messageId, attachments } = mail;
  return (
    <>
      <TitleBlock
        label="Message"
        cells={[
          { caption: 'From', value: from, grow: 2 },
          { caption: 'To', value: to.name ? `${to.name} <${to.email}>` : to.email, grow: 2 },
          { caption: 'Written', value: formatDateTimeFull(createdAt), grow: 1.5 },
          { caption: 'Standing', value: <MailStanding mail={mail} />, grow: 1.5 },
          { caption: 'Message-ID', value: messageId, mono: true, grow: 2 },
        ]}
      />
      {mail.status === 'sent' ? null : <Retry mailId={mail.id} />}
      {attachments.length > 0 ? (
        <Box as="ul" aria-label="Attachments" listStyleType="none" mb="4">
          {attachments.map(({ fileName, sha256 }, position) => (
            <li key={fileName}>
              <chakra.a
                color="act"
                href={apiUrl(`/mails/${mail.id}/attachments/${position}`)}
                download={fileName}
              >
                {fileName}
              </chakra.a>
              <Text fontFamily="mono" fontSize="xs" color="inkSoft" overflowWrap="anywhere">
                SHA-256 {sha256}
              </Text>
            </li>
          ))}
        </Box>
      ) : null}
      <Box mb="2">
        <Segmented label="Form" value={form} options={forms} onChange={setForm} />
      </Box>
      <Sheet overflow="hidden">
        {form === 'html' ? (
          // Nothing in the message runs; its links open beside this page.
          <chakra.iframe
            title={mail.subject}
            srcDoc={mail.html}
            sandbox="allow-popups allow-popups-to-escape-sandbox"
            referrerPolicy="no-referrer"
            display="block"
            w="full"
            h="70vh"
            minH="420px"
            border="0"
          />
        ) : (
          <chakra.pre
            tabIndex={0}
            aria-label="Plain text of the message"
            p="4"
            fontFamily="mono"
            fontSize="13px"
            whiteSpace="pre-wrap"
            overflowWrap="anywhere"
          >
            {mail.text}
          </chakra.pre>
        )}
      </Sheet>
    </>
  );
}

function Retry({ mailId }: { mailId: string }) {
  const queryClient = useQueryClient();
  const retry = useMutation({
    mutationFn: () => retryMail(mailId),
    onSuccess: () => notifyDone('The message is sent again'),
    onError: (error) => notifyProblem('Not sent again', error),
    onSettled: () => queryClient.invalidateQueries({ queryKey: ['mails'] }),
  });
  return (
    <Button mb="4" loading={retry.isPending} onClick={() => retry.mutate()}>
      Send now
    </Button>
  );
}
