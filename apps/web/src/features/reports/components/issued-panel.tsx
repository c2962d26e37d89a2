import { Box, Button, Flex, Link, Text } from '@chakra-ui/react';
import type { Report } from '@overtally/contracts';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { apiUrl } from '../../../lib/http.js';

/** How anybody checks an issued report: its digest, its code and page, and its numbers as data. */
export function IssuedPanel({ report }: { report: Report }) {
  const { id, pdfSha256, jsonSha256, csvSha256, checkCode, checkUrl } = report;
  if (!pdfSha256) return null;
  const copy = (what: string, text: string) => {
    navigator.clipboard.writeText(text).then(
      () => notifyDone(`${what} copied`),
      (error: unknown) => notifyProblem('Not copied', error),
    );
  };
  return (
    <Box as="section" aria-label="Issued report" mb="4" fontSize="13px">
      <Text color="inkSoft">SHA-256 of the issued PDF: a copy with another one is not this report.</Text>
      <Box as="span" fontFamily="mono" overflowWrap="anywhere" mr="2">
        {pdfSha256}
      </Box>
      <Button size="2xs" variant="ghost" colorPalette="act" onClick={() => copy('SHA-256', pdfSha256)}>
        Copy
      </Button>
      {checkCode && checkUrl ? (
        <Box mt="2">
          <Text color="inkSoft">
            Check code: with the number it opens the{' '}
            <Link href={checkUrl} target="_blank" rel="noreferrer" color="act">
              public check page
            </Link>
            , for anybody who holds a copy.
          </Text>
          <Box as="span" fontFamily="mono" mr="2">
            {checkCode}
          </Box>
          <Button
            size="2xs"
            variant="ghost"
            colorPalette="act"
            onClick={() => copy('Address of the check page', checkUrl)}
          >
            Copy the address
          </Button>
        </Box>
      ) : null}
      {jsonSha256 && csvSha256 ? (
        <Flex gap="4" mt="2" wrap="wrap">
          <Link href={apiUrl(`/reports/${id}/json`)} download color="act">
            Download JSON
          </Link>
          <Link href={apiUrl(`/reports/${id}/csv`)} download color="act">
            Download CSV
          </Link>
          <Text color="inkSoft">The same numbers as data.</Text>
        </Flex>
      ) : null}
    </Box>
  );
}
