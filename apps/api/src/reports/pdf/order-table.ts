import type { OrderVerdict, ReportSection, TotalVerdict } from '@overtally/contracts';
import { basisOfChannel } from '@overtally/limits';
import { formatList, formatPercent, formatQuantity, formatShare } from './format.js';
import type { Sheet } from './sheet.js';
import { drawTable, type Cell, type Column } from './table.js';
import { text, tinted } from './theme.js';
import { isOver, orderResultName, resultColour } from './words.js';

const rowHeight = 14.5;

const figure = (content: string, over = false, colour?: string): Cell => ({
  text: content,
  style: over && colour ? tinted(text.figureStrong, colour) : text.figure,
});

/** Which of the columns that not every verdict fills are there. */
interface Filled {
  uncertainty: boolean;
  highest: boolean;
}

/** Every order against its limit: value, uncertainty, part of the fundamental, highest 1.5 s value, limit, margin, share, result. */
export function drawOrderTable(sheet: Sheet, section: ReportSection): void {
  const { orders } = section.verdict;
  if (orders.length === 0) return;
  const filled: Filled = {
    uncertainty: orders.some((entry) => entry.uncertainty !== null),
    highest: orders.some((entry) => entry.smoothedMax !== null),
  };
  sheet.heading('Orders against their limits', 90);
  drawTable(sheet, orderColumns(filled), orderRows(section, filled), { rowHeight, groupOf: 5 });
  drawRemarks(sheet, orders);
}

function orderColumns({ uncertainty, highest }: Filled): Column[] {
  const right = (header: string, share: number): Column => ({ header, share, align: 'right' });
  return [
    right('Order', 0.75),
    right('Value', 1.25),
    ...(uncertainty ? [right('U\n(k = 2)', 1.15)] : []),
    right('Of funda-\nmental', 1.1),
    ...(highest ? [right('Highest\n1.5 s', 1.25)] : []),
    right('Limit', 1.25),
    right('Margin', 1.3),
    right('Share of\nlimit', 1.15),
    { header: 'Result', share: 1.5 },
  ];
}

function orderRows({ verdict, analysis }: ReportSection, filled: Filled): Cell[][] {
  const { unit, orders } = verdict;
  const parts = new Map(analysis.channel.harmonics.map((each) => [each.order, each.percentOfFundamental]));
  const { fundamental } = analysis.channel;
  const none = figure('–');
  const row = (
    cells: Record<'order' | 'value' | 'u' | 'part' | 'highest' | 'limit' | 'margin' | 'share', Cell>,
    result: Cell,
  ) => [
    cells.order,
    cells.value,
    ...(filled.uncertainty ? [cells.u] : []),
    cells.part,
    ...(filled.highest ? [cells.highest] : []),
    cells.limit,
    cells.margin,
    cells.share,
    result,
  ];
  const first =
    fundamental === null || orders.some(({ order }) => order === 1)
      ? []
      : [
          row(
            {
              ...{ order: figure('1'), value: figure(formatQuantity(fundamental.rms, unit)), u: none },
              ...{ part: figure(formatPercent(100)), highest: none, limit: none, margin: none, share: none },
            },
            { text: 'fundamental', style: tinted(text.cell, text.soft.colour) },
          ),
        ];
  const judged = orders.map((entry) => {
    const colour = resultColour(entry.result);
    const over = isOver(entry.result);
    return row(
      {
        order: figure(String(entry.order), over, colour),
        value: figure(formatQuantity(entry.mean, unit)),
        u: figure(formatQuantity(entry.uncertainty, unit, 2)),
        part: figure(formatPercent(parts.get(entry.order))),
        highest: figure(formatQuantity(entry.smoothedMax, unit)),
        limit: figure(formatQuantity(entry.limit, unit)),
        margin: figure(formatQuantity(entry.margin, unit), over, colour),
        share: figure(formatShare(entry.sharePercent), over, colour),
      },
      resultCell(entry.result),
    );
  });
  return [...first, ...judged];
}

const resultCell = (result: OrderVerdict['result']): Cell => ({
  text: orderResultName(result),
  style: tinted(isOver(result) ? text.cellStrong : text.cell, resultColour(result)),
});

/** Reasons that the columns do not show: a relief, an open decision, an order left out. */
function drawRemarks(sheet: Sheet, orders: readonly OrderVerdict[]): void {
  const byReason = new Map<string, number[]>();
  for (const { order, reason, result, sharePercent } of orders) {
    const decided = result === 'pass' || result === 'fail';
    const shown = decided && (result === 'pass') === (sharePercent ?? 0) <= 100;
    if (reason === null || shown) continue;
    byReason.set(reason, [...(byReason.get(reason) ?? []), order]);
  }
  sheet.y += 4;
  for (const [reason, at] of byReason) {
    sheet.room(14);
    sheet.paragraph(`Order ${formatList(at, 8)}: ${reason}`, text.soft);
  }
}

const totalNames: Record<string, string> = {
  THD: 'THD, total harmonic distortion',
  THC: 'THC, total harmonic current',
  POHC: 'POHC, partial odd harmonic current',
  PWHC: 'PWHC, partial weighted harmonic current',
  TDD: 'TDD, total demand distortion',
};

/** Totals such as THD against their limits, with what they are summed from. */
export function drawTotals(sheet: Sheet, { verdict: { totals }, analysis }: ReportSection): void {
  if (totals.length === 0) return;
  sheet.heading('Totals', 40);
  drawTable(
    sheet,
    [
      { header: `Total of ${basisOfChannel(analysis.channel)}`, share: 3.2 },
      { header: 'Value', share: 1.3, align: 'right' },
      { header: 'Limit', share: 1.3, align: 'right' },
      { header: 'Share', share: 1.2, align: 'right' },
      { header: 'Result', share: 2 },
    ],
    totals.map((total) => [
      { text: totalNames[total.name] ?? total.name },
      figure(formatQuantity(total.value, total.unit)),
      figure(formatQuantity(total.limit, total.unit)),
      figure(formatShare(total.sharePercent), isOver(total.result), resultColour(total.result)),
      totalResult(total),
    ]),
    {},
  );
}

function totalResult(total: TotalVerdict): Cell {
  if (total.limit === null)
    return { text: total.reason ?? 'no limit', style: tinted(text.cell, text.soft.colour) };
  return resultCell(total.result);
}
