import { Text } from '@chakra-ui/react';
import { MarginItem } from '../../../components/margin-column.js';
import { formatFixed, formatPercent, formatSi, signed } from '../../../lib/format.js';
import { usePrediction } from '../study-store.js';

/** Orders near a resonance. */
export function ResonanceRemarks() {
  const prediction = usePrediction();
  if (prediction.kind !== 'steady') return null;
  return prediction.steady.warnings.map(({ order, frequencyHz, peak, distancePercent }) => (
    <MarginItem key={order} tone="over" title={`Order ${order} near a resonance`}>
      <Text>
        {`${formatSi(frequencyHz, 'Hz')} lies ${signed(formatPercent(distancePercent))} from a peak at ${formatSi(peak.frequencyHz, 'Hz')}, where the gain is ${formatFixed(peak.gain, 2)}. A little drift of the values, or of the supply, brings it there.`}
      </Text>
    </MarginItem>
  ));
}

/** What a prediction does not say; always near the results. */
export function Cautions() {
  return (
    <MarginItem title="A prediction, not a measurement" tone="near">
      <Text>
        Linear stages with the values stated; saturation, temperature and loads that answer to the filter are
        left out. Build it, record it, and compare.
      </Text>
      <Text mt="1.5">
        Capacitors resonate with the supply, whose impedance changes, and hold energy after switching off:
        discharge and check before touching. Ratings for harmonic current and voltage, licensed practice and
        the local codes decide what may be built.
      </Text>
    </MarginItem>
  );
}
