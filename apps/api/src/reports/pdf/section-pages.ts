import type { ReportSection } from '@overtally/contracts';
import { formatFigure, formatMoment, formatPercent, formatQuantity, formatText } from './format.js';
import { frequencyWords } from './frequency-words.js';
import { drawFlags, drawNotes } from './notes-and-flags.js';
import { drawOrderChart } from './order-chart.js';
import { drawOrderTable, drawTotals } from './order-table.js';
import { drawProvenance } from './provenance.js';
import type { Sheet } from './sheet.js';
import { drawTallyStrip } from './tally-strip.js';
import { text, tinted } from './theme.js';
import { drawTitleBlock } from './title-block.js';
import { resultColour, resultName } from './words.js';

const stripWidth = 150;

/** The pages of one judged channel, beginning on a page of their own. */
export function drawSection(sheet: Sheet, section: ReportSection, index: number, count: number): void {
  sheet.newPage();
  sheet.group('Sect', () => {
    drawSectionHead(sheet, section, index, count);
    drawSectionBlock(sheet, section);
    drawVerdict(sheet, section);
    sheet.heading(`${section.verdict.channelName} by order`, 210);
    drawOrderChart(sheet, section);
    drawTotals(sheet, section);
    drawFlags(sheet, section.analysis.channel.flags);
    drawNotes(sheet, section);
    drawOrderTable(sheet, section);
    drawProvenance(sheet, section);
  });
}

function drawSectionHead(
  sheet: Sheet,
  { recording, verdict }: ReportSection,
  index: number,
  count: number,
): void {
  const top = sheet.y;
  sheet.paragraph(`Sheet ${index + 1} of ${count}`, text.soft);
  drawTallyStrip(sheet, verdict.orders, sheet.left + sheet.width - stripWidth, top, stripWidth, 26);
  sheet.paragraph(`${recording.number}  ${recording.name}`, text.heading, 'H2', {
    width: sheet.width - stripWidth - 20,
  });
  sheet.y = Math.max(sheet.y, top + 30) + 6;
}

function drawSectionBlock(sheet: Sheet, { recording, analysis, verdict }: ReportSection): void {
  const { channel } = analysis;
  const { windows } = channel;
  const highest = channel.harmonics.at(-1)?.order ?? channel.thdMaxOrder;
  const [frequencyCaption, frequency] = frequencyWords(channel.fundamental);
  drawTitleBlock(sheet, [
    [
      { caption: 'Equipment under test', value: formatText(recording.eut), share: 1.4 },
      { caption: 'Measuring chain', value: formatText(recording.measuringChain), share: 1.4 },
      { caption: 'Instrument', value: formatText(recording.instrument), share: 1.4 },
    ],
    [
      { caption: 'Captured', value: formatMoment(recording.capturedAt), share: 1.4 },
      { caption: 'Sample rate', value: formatQuantity(recording.sampleRateHz, 'Hz'), mono: true },
      { caption: 'Length', value: formatQuantity(recording.durationS, 's'), mono: true },
      { caption: 'Channel', value: channel.name },
    ],
    [
      { caption: frequencyCaption, value: frequency, mono: true, share: 1.4 },
      { caption: 'rms', value: formatQuantity(channel.rms, channel.unit), mono: true },
      {
        caption: `THD-F, single lines, orders 2 to ${Math.min(channel.thdMaxOrder, highest)}`,
        value: formatPercent(channel.thdFPercent),
        mono: true,
        share: 1.5,
      },
      { caption: 'Crest factor', value: formatFigure(channel.crestFactor), mono: true },
    ],
    [
      { caption: 'Limit set', value: verdict.limitSet.title, share: 2.4 },
      {
        caption: 'Windows',
        value: windows === null ? '–' : `${windows.count} of ${windows.cycles} cycles`,
        share: 1,
      },
      { caption: 'Result', value: resultName(verdict.result), colour: resultColour(verdict.result) },
    ],
  ]);
}

function drawVerdict(sheet: Sheet, { verdict }: ReportSection): void {
  sheet.y += 10;
  sheet.paragraph(`${resultName(verdict.result)}. ${verdict.reason}.`.replace(/\.\.$/, '.'), {
    ...tinted(text.strong, resultColour(verdict.result)),
  });
}
