import { defineSemanticTokens, defineTokens } from '@chakra-ui/react';
import { channelStyles } from './channel-styles.js';
import { dark, light, type Palette } from './palette.js';

export const tokens = defineTokens({
  fonts: {
    heading: { value: "'IBM Plex Sans', system-ui, sans-serif" },
    body: { value: "'IBM Plex Sans', system-ui, sans-serif" },
    mono: { value: "'IBM Plex Mono', 'IBM Plex Sans', ui-monospace, monospace" },
  },
  // Two weights are shipped.
  fontWeights: { medium: { value: 600 }, semibold: { value: 600 }, bold: { value: 600 } },
  durations: {
    fastest: { value: '50ms' },
    faster: { value: '80ms' },
    fast: { value: '100ms' },
    moderate: { value: '120ms' },
    slow: { value: '140ms' },
    slower: { value: '140ms' },
    slowest: { value: '140ms' },
  },
});

const both = (name: keyof Palette) => ({ value: { _light: light[name], _dark: dark[name] } });

/** What Chakra's recipes ask of a palette, from one text colour, one ground and their neighbours. */
const palette = (main: keyof Palette, ground: keyof Palette) => ({
  DEFAULT: both(main),
  solid: both(main),
  contrast: both('onAct'),
  fg: both(main),
  subtle: both(ground),
  muted: both('rule'),
  emphasized: both('ruleStrong'),
  border: both('edge'),
  focusRing: both('act'),
});

const channelColors = Object.fromEntries(
  channelStyles.map((style, index) => [
    String(index + 1),
    { value: { _light: style.light, _dark: style.dark } },
  ]),
);

export const semanticTokens = defineSemanticTokens({
  colors: {
    paper: both('paper'),
    sheet: both('sheet'),
    rule: both('rule'),
    ruleStrong: both('ruleStrong'),
    edge: both('edge'),
    ink: both('ink'),
    inkSoft: both('inkSoft'),
    wash: both('wash'),
    act: palette('act', 'wash'),
    over: palette('over', 'paper'),
    near: palette('near', 'paper'),
    within: palette('within', 'paper'),
    gray: { ...palette('ink', 'paper'), fg: both('ink') },
    channel: channelColors,
    bg: {
      DEFAULT: both('paper'),
      subtle: both('paper'),
      muted: both('paper'),
      emphasized: both('rule'),
      panel: both('sheet'),
      error: both('paper'),
    },
    fg: { DEFAULT: both('ink'), muted: both('inkSoft'), subtle: both('inkSoft'), error: both('over') },
    border: {
      DEFAULT: both('rule'),
      muted: both('rule'),
      subtle: both('rule'),
      emphasized: both('edge'),
      error: both('over'),
    },
  },
  radii: { l1: { value: '3px' }, l2: { value: '3px' }, l3: { value: '3px' } },
});
