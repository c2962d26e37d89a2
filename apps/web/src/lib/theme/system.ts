import { createSystem, defaultConfig, defineConfig } from '@chakra-ui/react';
import { globalCss } from './global-css.js';
import { recipes, slotRecipes } from './recipes.js';
import { semanticTokens, tokens } from './tokens.js';

/** Chakra's system with our tokens. Themes hang on the classes `light` and `dark` of the root element. */
export const system = createSystem(
  defaultConfig,
  defineConfig({ globalCss, theme: { tokens, semanticTokens, recipes, slotRecipes } }),
);
