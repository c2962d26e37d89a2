import { Box, Flex, Text } from '@chakra-ui/react';
import type { OrderVerdict, RepeatOrder, TotalVerdict, VerdictResult } from '@overtally/contracts';
import type { ReactNode } from 'react';
import { TallyStrip } from '../../../components/tally-strip.js';
import { ResultWords } from '../../../components/verdict/result-words.js';
import { VerdictTables } from '../../../components/verdict/verdict-tables.js';

interface JudgementProps {
  /** What stands over it: preview, or who judged and when. */
  caption: ReactNode;
  /** A preview is drawn with a broken frame: it is not stored. */
  preview: boolean;
  subject: string;
  unit: string;
  fileName: string;
  judgement: {
    result: VerdictResult;
    reason: string;
    orders: OrderVerdict[];
    totals: TotalVerdict[];
    repeatability?: { orders: RepeatOrder[] } | null;
  };
}

/** A result with its reason, its tally strip and its numbers. */
export function Judgement({ caption, preview, subject, unit, fileName, judgement }: JudgementProps) {
  const { result, reason, orders, totals, repeatability } = judgement;
  return (
    <Box
      borderWidth="1px"
      borderStyle={preview ? 'dashed' : 'solid'}
      borderColor="ruleStrong"
      borderRadius="3px"
      px="4"
      py="3"
    >
      <Text fontSize="xs" color="inkSoft">
        {caption}
      </Text>
      <Flex columnGap="6" rowGap="2" wrap="wrap" align="center" justify="space-between" mb="1">
        <Text fontSize="md" role={preview ? 'status' : undefined}>
          <ResultWords result={result} />
          {reason ? <>. {reason}.</> : null}
        </Text>
        {orders.length > 0 ? <TallyStrip shares={orders} /> : null}
      </Flex>
      <VerdictTables
        subject={subject}
        orders={orders}
        totals={totals}
        spread={repeatability?.orders}
        unit={unit}
        fileName={fileName}
        maxHeight="300px"
      />
    </Box>
  );
}
