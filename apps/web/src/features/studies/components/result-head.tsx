import { Box, chakra, Flex, Text } from '@chakra-ui/react';
import type { SeriesFigures } from '@overtally/dsp';
import type { Evaluation } from '@overtally/limits';
import { Sheet } from '../../../components/sheet.js';
import { TallyStrip } from '../../../components/tally-strip.js';
import { ResultWords } from '../../../components/verdict/result-words.js';
import { formatFixed, formatPercent, formatSi } from '../../../lib/format.js';
import { useDraftPart, usePrediction } from '../study-store.js';

/** Input and predicted output side by side: verdict, distortion, rms, crest factor. */
export function ResultHead() {
  const prediction = usePrediction();
  const inputUnit = useDraftPart((draft) => draft.inputUnit);
  const outputUnit = useDraftPart((draft) => draft.outputUnit);
  const thdMaxOrder = useDraftPart((draft) => draft.thdMaxOrder);
  if (prediction.kind !== 'steady') return null;
  const { input, output, before, after } = prediction.steady;
  return (
    <Sheet as="section" aria-label="Before and behind the stages" mb="4" px={{ base: '3', md: '4' }} py="3">
      <Flex gap={{ base: '4', md: '8' }} direction={{ base: 'column', sm: 'row' }}>
        <Side title="Before" {...{ figures: input, unit: inputUnit, evaluation: before, thdMaxOrder }} />
        <Side
          title="Predicted behind"
          {...{ figures: output, unit: outputUnit, evaluation: after, thdMaxOrder }}
        />
      </Flex>
    </Sheet>
  );
}

interface SideProps {
  title: string;
  figures: SeriesFigures;
  unit: string;
  evaluation: Evaluation | null;
  thdMaxOrder: number;
}

function Side({ title, figures, unit, evaluation, thdMaxOrder }: SideProps) {
  const percent = (ratio: number | null) => formatPercent(ratio === null ? null : 100 * ratio, 2);
  const rows = [
    [`THD to order ${thdMaxOrder}`, percent(figures.thdF)],
    ['rms', formatSi(figures.rms, unit)],
    ['Order 1', formatSi(figures.fundamentalRms, unit)],
    ['Crest factor', formatFixed(figures.crestFactor, 3)],
  ] as const;
  return (
    <chakra.section aria-label={title} flex="1" minW="0">
      <Flex align="baseline" gap="2.5" mb="1" wrap="wrap">
        <Text as="h2" fontWeight="600">
          {title}
        </Text>
        {evaluation ? <ResultWords result={evaluation.result} /> : null}
      </Flex>
      {evaluation ? <TallyStrip shares={evaluation.orders} size="md" /> : null}
      <Box
        as="dl"
        display="grid"
        gridTemplateColumns="auto 1fr"
        columnGap="3"
        rowGap="0.5"
        mt="2"
        fontSize="13px"
      >
        {rows.map(([label, value]) => (
          <Box key={label} display="contents">
            <chakra.dt color="inkSoft">{label}</chakra.dt>
            <chakra.dd fontFamily="mono" fontWeight="600">
              {value}
            </chakra.dd>
          </Box>
        ))}
      </Box>
      {evaluation ? (
        <Text fontSize="xs" color="inkSoft" mt="2">
          {evaluation.reason}
        </Text>
      ) : null}
    </chakra.section>
  );
}
