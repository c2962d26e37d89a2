import { Box, chakra } from '@chakra-ui/react';
import { NavLink } from 'react-router-dom';

export interface SpineTab {
  label: string;
  to: string;
  /** Stands apart at the foot of the spine. */
  atFoot?: boolean;
}

const Tab = chakra(NavLink, {
  base: {
    color: 'inkSoft',
    fontSize: 'sm',
    whiteSpace: 'nowrap',
    textDecoration: 'none',
    borderColor: 'transparent',
    borderBottomWidth: '3px',
    paddingLeft: '3',
    paddingRight: '3',
    paddingTop: '2.5',
    paddingBottom: '2.5',
    _hover: { color: 'ink' },
    '&.active': { color: 'ink', fontWeight: '600', bg: 'sheet', borderColor: 'act' },
    '&:focus-visible': { outlineOffset: '-2px' },
    md: {
      writingMode: 'vertical-rl',
      transform: 'rotate(180deg)',
      borderBottomWidth: '0',
      borderRightWidth: '3px',
      borderRightRadius: '3px',
      // Physical sides: the writing mode turns the logical ones.
      paddingLeft: '1.5',
      paddingRight: '1.5',
      paddingTop: '3.5',
      paddingBottom: '3.5',
    },
  },
});

/** Index tabs of a notebook: upright at the left edge, a scrolling row on narrow screens. */
export function Spine({ tabs, label }: { tabs: readonly SpineTab[]; label: string }) {
  return (
    <chakra.nav
      aria-label={label}
      display="flex"
      flexDirection={{ base: 'row', md: 'column' }}
      alignItems={{ base: 'stretch', md: 'flex-end' }}
      gap={{ base: '0', md: '1' }}
      overflowX={{ base: 'auto', md: 'visible' }}
      flexShrink="0"
      width={{ md: '60px' }}
      pt={{ md: '5' }}
      pb={{ md: '5' }}
      pr={{ md: '3' }}
      borderColor="rule"
      borderRightWidth={{ md: '1px' }}
      borderBottomWidth={{ base: '1px', md: '0' }}
    >
      {tabs.map((tab) => (
        <Box key={tab.to} mt={tab.atFoot ? { md: '6' } : undefined} display="flex">
          <Tab to={tab.to}>{tab.label}</Tab>
        </Box>
      ))}
    </chakra.nav>
  );
}
