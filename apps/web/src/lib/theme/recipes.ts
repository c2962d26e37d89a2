import { defineRecipe, defineSlotRecipe } from '@chakra-ui/react';

const control = { bg: 'sheet', borderColor: 'edge' };

export const recipes = {
  button: defineRecipe({
    base: { fontWeight: '600', lineHeight: '1.2' },
    variants: {
      size: { sm: {} },
      variant: {
        solid: { _hover: { bg: 'colorPalette.solid/88' }, _expanded: { bg: 'colorPalette.solid/88' } },
        outline: {
          bg: 'sheet',
          borderColor: 'edge',
          color: 'colorPalette.fg',
          _hover: { bg: 'wash' },
          _expanded: { bg: 'wash' },
        },
        ghost: { _hover: { bg: 'wash' }, _expanded: { bg: 'wash' } },
      },
    },
    defaultVariants: { size: 'sm', variant: 'outline' },
  }),
  input: defineRecipe({
    variants: { size: { sm: {} }, variant: { outline: control } },
    defaultVariants: { size: 'sm' },
  }),
  textarea: defineRecipe({
    variants: { size: { sm: {} }, variant: { outline: control } },
    defaultVariants: { size: 'sm' },
  }),
  link: defineRecipe({
    base: { color: 'act', textUnderlineOffset: '3px', borderRadius: '3px' },
    variants: { variant: { plain: { _hover: { textDecorationColor: 'currentColor' } } } },
  }),
};

export const slotRecipes = {
  nativeSelect: defineSlotRecipe({
    slots: ['root', 'field', 'indicator'],
    variants: { size: { sm: {} }, variant: { outline: { field: control } } },
    defaultVariants: { size: 'sm' },
  }),
  dialog: defineSlotRecipe({
    slots: ['backdrop', 'positioner', 'content', 'header', 'body', 'footer', 'title', 'closeTrigger'],
    base: {
      backdrop: { bg: 'ink/40', _dark: { bg: 'black/60' } },
      content: { bg: 'sheet', borderWidth: '1px', borderColor: 'ruleStrong', mx: '4' },
      title: { fontSize: 'xl', lineHeight: '1.25' },
    },
  }),
  menu: defineSlotRecipe({
    slots: ['content', 'item'],
    base: {
      content: { bg: 'sheet', borderWidth: '1px', borderColor: 'ruleStrong', minW: '52' },
      item: { _highlighted: { bg: 'wash' } },
    },
  }),
};
