import { Box, Button, Flex, Text } from '@chakra-ui/react';
import type { LimitSet } from '@overtally/contracts';
import { FigureFrame } from '../../../components/figure-frame.js';
import { FormField, SelectInput } from '../../../components/form-field.js';
import { Plot } from '../../../components/plot.js';
import { limitSetChoice } from '../../../lib/limit-set-name.js';
import { usePalette } from '../../../lib/theme/use-palette.js';
import { ceilingFor, setsFor } from '../ceiling.js';
import { orderLines } from '../charts/order-lines.js';
import { spectrumLines, type SpectrumOf } from '../charts/spectrum-lines.js';
import type { OverlayView } from '../overlay-link.js';
import { mixedUnits, type OverlaySeries } from '../series.js';
import { OverlayTable } from './overlay-table.js';
import { OverlayToggles } from './overlay-toggles.js';

interface OverlayFigureProps {
  series: readonly OverlaySeries[];
  /** Spectra that have arrived; used along the frequency. */
  spectra: readonly SpectrumOf[];
  /** Spectra still on their way. */
  pending: number;
  view: OverlayView;
  limitSets: readonly LimitSet[];
  onChange: (changes: Partial<OverlayView>) => void;
}

const height = 460;

/** The channels over each other, with their table twin and, by order, a limit as a ceiling. */
export function OverlayFigure({ series, spectra, pending, view, limitSets, onChange }: OverlayFigureProps) {
  const palette = usePalette();
  const refusal = mixedUnits(series, view.amplitude);
  const sets = setsFor(series, limitSets);
  const set = sets.find(({ id }) => id === view.limitSetId) ?? null;
  const byOrder = view.by === 'order';
  const ceiling = ceilingFor(byOrder ? set : null, series, view.amplitude);
  const { traces, layout } = byOrder
    ? orderLines(series, view, ceiling.limits, palette)
    : spectrumLines(spectra, view, palette);
  return (
    <FigureFrame
      title={byOrder ? 'By order' : 'By frequency'}
      subtitle={view.amplitude === 'relative' ? '% of each channel’s own fundamental' : 'rms'}
      toggles={<OverlayToggles view={view} onChange={onChange} />}
      table={<OverlayTable series={series} view={view} limits={ceiling.limits} />}
    >
      {refusal ? (
        <Refusal words={refusal} onRelative={() => onChange({ amplitude: 'relative' })} />
      ) : (
        <>
          {pending > 0 ? (
            <Text role="status" color="inkSoft" fontSize="13px">
              {pending === 1 ? 'One spectrum is loading' : `${pending} spectra are loading`}
            </Text>
          ) : null}
          <Plot
            label={`${series.map(({ label }) => label).join(', ')} ${byOrder ? 'by order' : 'by frequency'}`}
            traces={traces}
            layout={layout}
            height={height}
          />
        </>
      )}
      {byOrder ? (
        <LimitChoice
          sets={sets}
          value={set?.id ?? ''}
          gap={refusal ? null : ceiling.gap}
          onChange={(limitSetId) => onChange({ limitSetId })}
        />
      ) : null}
    </FigureFrame>
  );
}

function Refusal({ words, onRelative }: { words: string; onRelative: () => void }) {
  return (
    <Flex direction="column" align="flex-start" gap="2" minH="120px" justify="center" role="alert">
      <Text fontWeight="600">{words}.</Text>
      <Text color="inkSoft" maxW="60ch">
        Relative shows each channel in percent of its own fundamental.
      </Text>
      <Button onClick={onRelative}>Switch to relative</Button>
    </Flex>
  );
}

function LimitChoice({
  sets,
  value,
  gap,
  onChange,
}: {
  sets: readonly LimitSet[];
  value: string;
  gap: string | null;
  onChange: (limitSetId: string | null) => void;
}) {
  return (
    <Flex align="flex-end" columnGap="4" rowGap="2" wrap="wrap" pt="2">
      <Box flex="0 1 320px" minW="0">
        <FormField label="Limit as a ceiling">
          <SelectInput
            disabled={sets.length === 0}
            options={[
              { value: '', label: sets.length > 0 ? 'None' : 'No set for these quantities together' },
              ...sets.map((set) => ({ value: set.id, label: limitSetChoice(set) })),
            ]}
            value={value}
            onChange={(event) => onChange(event.target.value || null)}
          />
        </FormField>
      </Box>
      {gap ? (
        <Text color="near" flex="1 1 260px" maxW="60ch" pb="1.5">
          {gap}
        </Text>
      ) : null}
    </Flex>
  );
}
