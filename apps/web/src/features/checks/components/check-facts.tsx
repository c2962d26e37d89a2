import { Box, Text } from '@chakra-ui/react';
import type { ReportCheck } from '@overtally/contracts';
import { StatusMark } from '../../../components/status-mark.js';
import { TitleBlock } from '../../../components/title-block.js';
import { formatDateTime } from '../../../lib/format-date.js';

/** What was issued under number and code, and whether it still counts. */
export function CheckFacts({ check }: { check: ReportCheck }) {
  const { number, revision, issuedAt, state, newest, pdfSha256 } = check;
  const isCurrent = state === 'current';
  return (
    <>
      <Box mb="4" role="status">
        <StatusMark tone={isCurrent ? 'within' : 'near'}>
          {isCurrent
            ? `Issued, and current: there is no newer revision.`
            : `Issued, and superseded${newest ? ` by revision ${newest.revision} of ${formatDateTime(newest.issuedAt)}` : ''}.`}
        </StatusMark>
        {isCurrent ? null : (
          <Text color="inkSoft" mt="1">
            Ask who gave you this report for the revision that counts now.
          </Text>
        )}
      </Box>
      <TitleBlock
        label="Issued report"
        cells={[
          { caption: 'Number', value: number, mono: true },
          { caption: 'Revision', value: String(revision), mono: true },
          { caption: 'Issued', value: formatDateTime(issuedAt), grow: 1.5 },
          { caption: 'SHA-256 of the PDF', value: pdfSha256, mono: true, grow: 5 },
        ]}
      />
    </>
  );
}
