import type { HarmonicFamily, SpectralLine } from '@overtally/contracts';
import type { PlotTrace } from '../../../components/plot.js';
import { formatHz, formatSi } from '../../../lib/format.js';
import { channelStyle } from '../../../lib/theme/channel-styles.js';
import { dark, type Palette } from '../../../lib/theme/palette.js';

/** How the lines of a family are marked: the same shape as a letter in text and as Plotly's symbol. */
export interface FamilyMark {
  glyph: string;
  symbol: string;
}

const marks: readonly FamilyMark[] = [
  { glyph: '●', symbol: 'circle' },
  { glyph: '■', symbol: 'square' },
  { glyph: '▲', symbol: 'triangle-up' },
  { glyph: '◆', symbol: 'diamond' },
  { glyph: '▼', symbol: 'triangle-down' },
  { glyph: '★', symbol: 'star' },
];
const alone: FamilyMark = { glyph: '×', symbol: 'x-thin' };

/** Mark of the family at `index`; lines of none have a cross. After the last mark they repeat. */
export const familyMark = (index: number | null): FamilyMark =>
  index === null ? alone : (marks[index % marks.length] ?? alone);

/** Colour of a family; lines of none are drawn in ink. */
export function familyColor(index: number | null, palette: Palette): string {
  if (index === null) return palette.ink;
  const style = channelStyle(index);
  return palette === dark ? style.dark : style.light;
}

/** "order 5 of the series of 49.98 Hz", or that the line stands alone. */
export function familyWords(
  { familyIndex, order }: SpectralLine,
  families: readonly HarmonicFamily[],
): string {
  const family = familyIndex === null ? undefined : families[familyIndex];
  if (!family || order === null) return 'in no harmonic series';
  return `order ${order} of the series of ${formatHz(family.fundamentalHz, 2)}`;
}

/** Marks on the largest lines, by family. */
export function lineMarks(
  lines: readonly SpectralLine[],
  families: readonly HarmonicFamily[],
  scale: { factor: number; gain: number; unit: string },
  palette: Palette,
): PlotTrace {
  const colors = lines.map(({ familyIndex }) => familyColor(familyIndex, palette));
  return {
    type: 'scatter',
    mode: 'markers',
    x: lines.map(({ frequencyHz }) => frequencyHz * scale.factor),
    y: lines.map(({ rms }) => (rms > 0 ? rms * scale.gain : null)),
    customdata: lines.map((line) =>
      [
        formatHz(line.frequencyHz, 3),
        formatSi(line.rms * scale.gain, scale.unit),
        familyWords(line, families),
      ].join('<br>'),
    ),
    marker: {
      symbol: lines.map(({ familyIndex }) => familyMark(familyIndex).symbol),
      size: 8,
      color: colors,
      line: { color: colors, width: 1.5 },
    },
    hovertemplate: '%{customdata}<extra></extra>',
  };
}
