import { Box, Button, Flex, Heading, Text } from '@chakra-ui/react';
import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import { BrandMark } from '../../components/brand-mark.js';
import { ErrorState } from '../../components/error-state.js';
import { LoadingState } from '../../components/loading-state.js';
import { Sheet } from '../../components/sheet.js';
import { StatusMark } from '../../components/status-mark.js';
import { ThemeSwitch } from '../../components/theme-switch.js';
import { checkQuery } from '../../features/checks/api/get-check.js';
import { CheckFacts } from '../../features/checks/components/check-facts.js';
import { CheckForm } from '../../features/checks/components/check-form.js';
import { FileMatch } from '../../features/checks/components/file-match.js';
import { ApiProblem } from '../../lib/api-problem.js';
import { paths } from '../paths.js';

/** The public page that tells whether a report is one that was issued; nobody signs in for it. */
export function Component() {
  const { number = '', code = '' } = useParams();
  const isAsked = number !== '' && code !== '';
  return (
    <Flex direction="column" minH="100dvh" px="4">
      <title>Check a report · Overtally</title>
      <Flex justify="space-between" align="center" py="2">
        <BrandMark named />
        <ThemeSwitch />
      </Flex>
      <Box as="main" w="full" maxW="720px" mx="auto" pt={{ base: '4', md: '10' }} pb="12" flex="1">
        <Heading as="h1" fontSize="2xl" lineHeight="1.25" mb="1">
          Check a report
        </Heading>
        <Text color="inkSoft" mb="5" maxW="62ch">
          Number and check code stand on the first page of each issued report. Here you see whether it was
          issued, whether it still counts, and whether your PDF is the one that was issued.
        </Text>
        {isAsked ? <Checked key={`${number}/${code}`} number={number} code={code} /> : <Ask />}
      </Box>
    </Flex>
  );
}

function Ask({ number = '', code = '' }: { number?: string; code?: string }) {
  const navigate = useNavigate();
  return (
    <Sheet px={{ base: '4', md: '6' }} py="6" maxW="440px">
      <CheckForm
        initial={{ number, code }}
        onCheck={(values) => void navigate(paths.check(values.number, values.code))}
      />
    </Sheet>
  );
}

function Checked({ number, code }: { number: string; code: string }) {
  const navigate = useNavigate();
  const check = useQuery(checkQuery(number, code));
  if (check.isPending) return <LoadingState label="Checking the report" />;
  if (check.isError) {
    const { error } = check;
    const isUnknown = error instanceof ApiProblem && error.status === 404;
    if (!isUnknown) return <ErrorState error={error} onRetry={() => void check.refetch()} />;
    return (
      <>
        <Box role="status" mb="2">
          <StatusMark tone="over">No report was issued under this number and code.</StatusMark>
        </Box>
        <Text color="inkSoft" mb="5" maxW="62ch">
          Compare both with the printed report. If they agree, the report was not issued by this laboratory:
          ask whoever gave it to you.
        </Text>
        <Ask number={number} code={code} />
      </>
    );
  }
  return (
    <>
      <CheckFacts check={check.data} />
      <FileMatch sha256={check.data.pdfSha256} />
      <Button mt="5" variant="ghost" colorPalette="act" onClick={() => void navigate(paths.check())}>
        Check another report
      </Button>
    </>
  );
}
