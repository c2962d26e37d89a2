import { Box, Flex } from '@chakra-ui/react';
import type { HarmonicFamily, SpectralLine } from '@overtally/contracts';
import { formatHz } from '../../../lib/format.js';
import { usePalette } from '../../../lib/theme/use-palette.js';
import { familyColor, familyMark } from '../charts/family-marks.js';

/** The mark of a harmonic series, as it stands in the spectrum. */
export function FamilyGlyph({ index }: { index: number | null }) {
  const palette = usePalette();
  return (
    <Box as="span" aria-hidden="true" color={familyColor(index, palette)} mr="1.5">
      {familyMark(index).glyph}
    </Box>
  );
}

interface FamilyLegendProps {
  lines: readonly SpectralLine[];
  families: readonly HarmonicFamily[];
}

/** What the marks in the spectrum stand for. */
export function FamilyLegend({ lines, families }: FamilyLegendProps) {
  const isAnyAlone = lines.some(({ familyIndex }) => familyIndex === null);
  return (
    <Flex as="ul" listStyleType="none" wrap="wrap" columnGap="5" fontSize="xs" color="inkSoft">
      {families.map(({ fundamentalHz }, index) => (
        <li key={fundamentalHz}>
          <FamilyGlyph index={index} />
          series of {formatHz(fundamentalHz, 2)}
        </li>
      ))}
      {isAnyAlone ? (
        <li>
          <FamilyGlyph index={null} />
          in no harmonic series
        </li>
      ) : null}
    </Flex>
  );
}
