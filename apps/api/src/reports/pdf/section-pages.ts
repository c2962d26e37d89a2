import type { ReportSection } from '@overtally/contracts';
import { drawPanel } from './cover-page.js';
import { drawFacts } from './facts.js';
import { formatFigure, formatMoment, formatPercent, formatQuantity } from './format.js';
import { frequencyWords } from './frequency-words.js';
import { ratingsWords } from './items.js';
import { methodFacts } from './method.js';
import { drawFlags, drawNotes } from './notes-and-flags.js';
import { drawOrderChart } from './order-chart.js';
import { drawOrderTable, drawTotals } from './order-table.js';
import { drawProvenance } from './provenance.js';
import { drawChain, drawConditions, drawRepeats, drawSupply } from './section-tables.js';
import type { Sheet } from './sheet.js';
import { drawTallyStrip } from './tally-strip.js';
import { text, tinted } from './theme.js';
import { drawDistortion, drawWaveform } from './time-chart.js';
import { drawTitleBlock, type TitleCell } from './title-block.js';
import { resultColour, resultName, stated, verdictInShort } from './words.js';

const stripWidth = 160;

/** The pages of one judged channel, beginning on a page of their own. */
export function drawSection(sheet: Sheet, section: ReportSection, index: number, count: number): void {
  sheet.newPage();
  sheet.group('Sect', () => {
    drawSectionHead(sheet, section, index, count);
    drawSectionBlock(sheet, section);
    drawVerdict(sheet, section);
    drawWaveform(sheet, section);
    sheet.heading(`${section.verdict.channelName} by order`, 210);
    drawOrderChart(sheet, section);
    drawTotals(sheet, section);
    drawDistortion(sheet, section);
    drawFlags(sheet, section.analysis.channel.flags);
    drawNotes(sheet, section);
    drawRepeats(sheet, section);
    drawOrderTable(sheet, section);
    drawSupply(sheet, section);
    sheet.heading('Method', 80);
    drawFacts(sheet, methodFacts(section));
    drawConditions(sheet, section);
    drawChain(sheet, section);
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
  const words = `${recording.number}  ${recording.name}`;
  sheet.mark(`${words}, ${verdict.channelName}: ${resultName(verdict.result)}`);
  sheet.paragraph(`Sheet ${index + 1} of ${count}`, text.kicker);
  sheet.paragraph(words, text.heading, 'H2', { width: sheet.width - stripWidth - 20 });
  const end = sheet.y;
  sheet.tag(
    'Figure',
    () => drawTallyStrip(sheet, verdict.orders, sheet.right - stripWidth, top, stripWidth, 28),
    { alt: `Tally strip of ${verdict.channelName}: ${verdictInShort(verdict)}` },
  );
  sheet.y = Math.max(end, top + 32) + 6;
}

function drawSectionBlock(sheet: Sheet, section: ReportSection): void {
  const { recording, analysis, verdict } = section;
  const { channel } = analysis;
  const highest = channel.harmonics.at(-1)?.order ?? channel.thdMaxOrder;
  const [frequencyCaption, frequency] = frequencyWords(channel.fundamental);
  drawTitleBlock(sheet, [
    equipmentCells(section),
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
        caption: `THD-F, lines, orders 2 to ${Math.min(channel.thdMaxOrder, highest)}`,
        value: formatPercent(channel.thdFPercent),
        mono: true,
      },
      { caption: 'Crest factor', value: formatFigure(channel.crestFactor), mono: true },
    ],
    [
      { caption: 'Limit set', value: verdict.limitSet.title, share: 3.4 },
      { caption: 'Result', value: resultName(verdict.result), colour: resultColour(verdict.result) },
    ],
  ]);
}

function equipmentCells({ recording, equipment, operatingMode, chain }: ReportSection): TitleCell[] {
  const item =
    equipment === null
      ? stated(recording.eut)
      : [
          equipment.name,
          [equipment.manufacturer, equipment.model].filter((part) => part !== '').join(' '),
          `No. ${stated(equipment.serialNumber)}`,
          ratingsWords(equipment.ratings),
        ]
          .filter((part) => part !== '')
          .join('\n');
  return [
    { caption: 'Equipment under test', value: item, share: 1.8 },
    { caption: 'Operating mode', value: stated(operatingMode?.name ?? ''), share: 1.2 },
    {
      caption: 'Measuring chain',
      value: stated(chain?.name ?? recording.measuringChain),
      share: 1.4,
    },
  ];
}

function drawVerdict(sheet: Sheet, { verdict }: ReportSection): void {
  const colour = resultColour(verdict.result);
  const place = { x: sheet.left + 14, width: sheet.width - 14 };
  sheet.y += 10;
  drawPanel(sheet, colour, () => {
    const words = `${resultName(verdict.result)}. ${verdict.reason}.`.replace(/\.\.$/, '.');
    sheet.paragraph(words, tinted(text.strong, colour), 'P', place);
    sheet.paragraph(verdict.decisionRuleText, text.soft, 'P', place);
  });
}
