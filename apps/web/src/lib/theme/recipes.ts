import { defineRecipe, defineSlotRecipe } from '@chakra-ui/react';
import { dialogAnatomy, menuAnatomy, nativeSelectAnatomy, tableAnatomy } from '@chakra-ui/react/anatomy';

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
          color: 'ink',
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
    slots: nativeSelectAnatomy.keys(),
    variants: { size: { sm: {} }, variant: { outline: { field: control } } },
    defaultVariants: { size: 'sm' },
  }),
  table: defineSlotRecipe({
    slots: tableAnatomy.keys(),
    base: {
      columnHeader: { fontSize: 'xs', fontWeight: '400', color: 'inkSoft', whiteSpace: 'nowrap' },
      body: { '& tr:last-of-type > *': { borderBottomWidth: '0' } },
    },
    variants: {
      variant: {
        line: { row: { bg: 'transparent' }, columnHeader: { borderColor: 'ruleStrong' } },
      },
      size: {
        sm: { columnHeader: { px: '3', py: '1.5' }, cell: { px: '3', py: '1.5' } },
        md: { columnHeader: { px: '3', py: '2' }, cell: { px: '3', py: '2.5' } },
      },
    },
  }),
  dialog: defineSlotRecipe({
    slots: dialogAnatomy.keys(),
    base: {
      backdrop: { bg: 'ink/40', _dark: { bg: 'black/60' } },
      content: { bg: 'sheet', borderWidth: '1px', borderColor: 'ruleStrong', mx: '4' },
      title: { fontSize: 'xl', lineHeight: '1.25' },
    },
  }),
  menu: defineSlotRecipe({
    slots: menuAnatomy.keys(),
    base: {
      content: { bg: 'sheet', borderWidth: '1px', borderColor: 'ruleStrong', minW: '52' },
      item: { _highlighted: { bg: 'wash' } },
    },
  }),
};
