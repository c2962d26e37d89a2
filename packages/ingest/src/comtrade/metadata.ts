import type { CffHead } from './cff.js';

const MOST_TEXTS = 50;
const LONGEST = 500;

/** What the file tells beside the samples, by English names; transformer ratios by the channels' names. */
export function comtradeMetadata({ config, texts }: CffHead, names: string[]): Record<string, string> {
  const entries: [string, string][] = [
    ['station', config.station],
    ['device', config.device],
    ['revision', String(config.revision)],
    ['lineFrequencyHz', config.lineFrequencyHz === null ? '' : String(config.lineFrequencyHz)],
    ['startTime', config.start],
    ['triggerTime', config.trigger],
    ['header', texts.HDR.join('\n')],
  ];
  for (const [index, { primary, secondary, side }] of config.analog.entries()) {
    if (primary === null || secondary === null || (primary === 1 && secondary === 1)) continue;
    const kept = side === null ? '' : `, values are ${side}`;
    entries.push([`${names[index]} ratio`, `${primary} : ${secondary}${kept}`]);
  }
  for (const text of texts.INF.slice(0, MOST_TEXTS)) {
    const pair = /^([^=]{1,60}?)\s*=\s*(.*)$/.exec(text);
    if (pair !== null) entries.push([`info ${pair[1]}`, pair[2] ?? '']);
  }
  const filled = entries.filter(([, value]) => value !== '');
  return Object.fromEntries(filled.map(([key, value]) => [key, value.slice(0, LONGEST)]));
}
