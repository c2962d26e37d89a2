import { Button, Flex, Text } from '@chakra-ui/react';
import type { Analysis, Recording } from '@overtally/contracts';
import { useState } from 'react';
import { MarginItem, MarginRow } from '../../../../components/margin-column.js';
import { codeTitle, severity } from '../flags/flag-words.js';
import { MainsCaution } from '../mains-caution.js';
import { EffectiveFigure } from './effective-figure.js';
import { NeutralSection } from './neutral-section.js';
import { OrderPowerFigure } from './order-power-figure.js';
import { PairFigure } from './pair-figure.js';
import { PhasesFigure } from './phases-figure.js';
import { PowerChooser } from './power-chooser.js';
import { circuitsOf, type Circuit } from './circuits.js';
import { SequenceFigure } from './sequence-figure.js';
import { TransformerSection } from './transformer-section.js';

interface PowerViewProps {
  recording: Recording;
  analysis: Analysis;
  /** Shows the figures of a channel instead. */
  onChannel: (index: number) => void;
}

/** Power where voltages stand with their currents: pair by pair, and three phases together. */
export function PowerView({ recording, analysis, onChannel }: PowerViewProps) {
  const circuits = circuitsOf(analysis);
  const [chosen, setChosen] = useState<string | null>(null);
  const circuit = circuits.find(({ key }) => key === chosen) ?? circuits[0];
  if (!circuit) return null;
  const fileName = `${recording.number}-power-${circuit.key}`;
  return (
    <>
      <PowerChooser circuits={circuits} value={circuit.key} onChange={setChosen} />
      <MarginRow
        label="Margin beside the power"
        title="Margin"
        margin={
          <>
            <CircuitFlags analysis={analysis} circuit={circuit} onChannel={onChannel} />
            <MainsCaution />
          </>
        }
      >
        {circuit.kind === 'pair' ? (
          <>
            <PairFigure pair={circuit.pair} name={circuit.name} fileName={fileName} />
            <OrderPowerFigure pair={circuit.pair} name={circuit.name} fileName={`${fileName}-orders`} />
            <TransformerSection
              pair={circuit.pair}
              ratedCurrentA={analysis.settings.ratedCurrentA ?? null}
              name={circuit.name}
              fileName={`${fileName}-transformer`}
            />
          </>
        ) : (
          <>
            <EffectiveFigure set={circuit.set} name={circuit.name} fileName={fileName} />
            <PhasesFigure set={circuit.set} phaseNames={circuit.phaseNames} fileName={`${fileName}-phases`} />
            <SequenceFigure set={circuit.set} fileName={fileName} />
            <NeutralSection set={circuit.set} fileName={`${fileName}-neutral`} />
          </>
        )}
      </MarginRow>
    </>
  );
}

/** Errors and warnings on the channels that the power is made of. */
function CircuitFlags({
  analysis,
  circuit,
  onChannel,
}: Pick<PowerViewProps, 'analysis' | 'onChannel'> & { circuit: Circuit }) {
  const channels = analysis.channels.filter(({ index }) => circuit.channels.includes(index));
  return channels.flatMap(({ index, name, flags }) =>
    flags
      .filter((flag) => flag.severity !== 'info')
      .map((flag) => (
        <MarginItem
          key={`${index} ${flag.code}`}
          tone={severity[flag.severity].tone}
          title={`${name}: ${codeTitle(flag.code)}`}
          aside={severity[flag.severity].words}
        >
          <Text>{flag.message}</Text>
          <Flex ml="-1.5">
            <Button size="2xs" variant="ghost" px="1.5" onClick={() => onChannel(index)}>
              See {name}
            </Button>
          </Flex>
        </MarginItem>
      )),
  );
}
