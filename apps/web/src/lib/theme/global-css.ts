import { defineGlobalStyles } from '@chakra-ui/react';

export const globalCss = defineGlobalStyles({
  html: { colorPalette: 'act', lineHeight: '1.45' },
  body: { bg: 'paper', color: 'ink', fontSize: 'sm', fontVariantNumeric: 'tabular-nums' },
  'h1, h2, h3': { textWrap: 'balance' },
  ':focus-visible': { outline: '2px solid', outlineColor: 'act', outlineOffset: '2px' },
  'main:focus-visible': { outline: 'none' },
  '::selection': { bg: 'wash', color: 'ink' },
  '::placeholder': { color: 'inkSoft' },
  '*, ::before, ::after': {
    _motionReduce: {
      animationDuration: '0.01ms !important',
      animationIterationCount: '1 !important',
      transitionDuration: '0.01ms !important',
    },
  },
});
