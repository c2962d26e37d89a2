import { Box, Text } from '@chakra-ui/react';
import type { ReportStudy } from '@overtally/contracts';
import { Section } from '../../../components/section.js';
import { TitleBlock, type TitleCell } from '../../../components/title-block.js';
import { ResultWords } from '../../../components/verdict/result-words.js';
import { VerdictTables } from '../../../components/verdict/verdict-tables.js';
import { formatDateTime } from '../../../lib/format-date.js';
import { formatPercent, formatSi, none } from '../../../lib/format.js';

/** One study as the report shows it: a prediction, apart from what was measured. */
export function ReportPrediction({ study, place }: { study: ReportStudy; place: number }) {
  const { result } = study;
  const name = `${study.number} ${study.name}, version ${study.version}`;
  return (
    <Section title={`Prediction ${place}. ${name}`} mt="3">
      <TitleBlock label={`Prediction ${place}`} cells={titleCells(study)} />
      <Text fontWeight="600" color="near">
        Prediction, not a measurement
      </Text>
      <Text maxW="80ch">Starts from: {study.source.words}.</Text>
      {study.assumptions ? (
        <Text maxW="80ch" whiteSpace="pre-line">
          Assumptions: {study.assumptions}
        </Text>
      ) : null}
      <Box as="ol" ps="6" my="2" listStyleType="decimal">
        {study.stages.map((stage, index) => (
          <li key={index}>
            {stage.name}
            {stage.isOn ? '' : ' (off)'}: {stageWords(stage)}
          </li>
        ))}
      </Box>
      {result.output === null ? (
        <Text color="over">There is no steady state: {result.stability.reason}</Text>
      ) : null}
      <Outcome side="Before" verdict={result.verdictBefore} />
      <Outcome side="Behind, predicted" verdict={result.verdictAfter} />
      {result.verdictAfter ? (
        <VerdictTables
          subject={`${name}, predicted`}
          orders={result.verdictAfter.orders}
          totals={result.verdictAfter.totals}
          unit={study.outputUnit}
          fileName={`${study.number}-predicted`}
          maxHeight="360px"
        />
      ) : null}
      {result.warnings.map(({ order, message }) => (
        <Text key={order} color="near">
          {message}.
        </Text>
      ))}
      <Text color="inkSoft" fontSize="13px" mt="3">
        Saved by {study.author.name}, {formatDateTime(study.savedAt)}; engine {result.engineVersion}.
      </Text>
    </Section>
  );
}

function Outcome({ side, verdict }: { side: string; verdict: ReportStudy['result']['verdictAfter'] }) {
  if (verdict === null) return null;
  return (
    <Text maxW="80ch">
      {side}: <ResultWords result={verdict.result} />. {verdict.reason}. {verdict.decisionRuleText}
    </Text>
  );
}

function stageWords({ kind, values, words }: ReportStudy['stages'][number]): string {
  const parts = values.map(({ symbol, value, unit, tolerancePercent }) => {
    const tolerance = tolerancePercent === null ? '' : ` ± ${tolerancePercent} %`;
    return `${symbol} = ${formatSi(value, unit, { digits: 5, trim: true })}${tolerance}`;
  });
  return [kind, ...parts, words].filter((part) => part !== '').join(', ');
}

function titleCells({ result, limitSet, inputUnit, outputUnit }: ReportStudy): TitleCell[] {
  const { input, output } = result;
  const percent = (ratio: number | null | undefined) =>
    ratio === null || ratio === undefined ? none : formatPercent(100 * ratio);
  return [
    { caption: 'rms before', value: formatSi(input.rms, inputUnit), mono: true },
    { caption: 'rms behind', value: output ? formatSi(output.rms, outputUnit) : none, mono: true },
    { caption: 'THD-F before', value: percent(input.thdF), mono: true },
    { caption: 'THD-F behind', value: percent(output?.thdF), mono: true },
    { caption: 'Limit set', value: limitSet?.title ?? 'none', grow: 2 },
  ];
}
