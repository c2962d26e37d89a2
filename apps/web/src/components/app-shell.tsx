import { Box, chakra, HStack, Link, SkipNavContent, SkipNavLink } from '@chakra-ui/react';
import { useState, type ReactNode } from 'react';
import { Link as RouterLink } from 'react-router-dom';
import { BrandMark } from './brand-mark.js';
import { CrumbContext } from './crumb-context.js';
import { Spine, type SpineTab } from './spine.js';

interface AppShellProps {
  /** Where the mark leads. */
  homeTo: string;
  /** The project at hand; absent outside projects. */
  place?: { label: string; to: string };
  tabs: readonly SpineTab[];
  tabsLabel: string;
  /** Theme switch and account menu. */
  tools: ReactNode;
  children: ReactNode;
}

/** Frame of every signed-in page: top bar, spine of index tabs, and the page. */
export function AppShell({ homeTo, place, tabs, tabsLabel, tools, children }: AppShellProps) {
  const [crumb, setCrumb] = useState<string | null>(null);
  return (
    <Box minH="100dvh" display="flex" flexDirection="column">
      <SkipNavLink id="main">Skip to the page</SkipNavLink>
      <chakra.header
        display="flex"
        alignItems="center"
        gap={{ base: '3', md: '5' }}
        minH="52px"
        px={{ base: '3', md: '4' }}
        borderBottomWidth="1px"
        borderColor="rule"
      >
        <Link asChild aria-label="Overtally, all projects" flexShrink="0" color="ink">
          <RouterLink to={homeTo}>
            <Box as="span" display={{ base: 'none', md: 'flex' }}>
              <BrandMark named />
            </Box>
            <Box as="span" display={{ base: 'flex', md: 'none' }}>
              <BrandMark />
            </Box>
          </RouterLink>
        </Link>
        <Place place={place} crumb={crumb} />
        <HStack ml="auto" gap="2" flexShrink="0">
          {tools}
        </HStack>
      </chakra.header>
      <Box flex="1" display="flex" flexDirection={{ base: 'column', md: 'row' }} minW="0">
        <Spine tabs={tabs} label={tabsLabel} />
        <SkipNavContent id="main" asChild>
          <chakra.main flex="1" minW="0" px={{ base: '4', md: '7' }} pt="5" pb="12" maxW="1680px">
            <CrumbContext.Provider value={setCrumb}>{children}</CrumbContext.Provider>
          </chakra.main>
        </SkipNavContent>
      </Box>
    </Box>
  );
}

function Place({ place, crumb }: { place: AppShellProps['place']; crumb: string | null }) {
  if (!place) return null;
  return (
    <HStack as="nav" aria-label="Place" gap="2" minW="0" overflow="hidden" whiteSpace="nowrap">
      <Link
        asChild
        display="block"
        truncate
        minW="0"
        color={crumb ? 'inkSoft' : 'ink'}
        fontWeight={crumb ? '400' : '600'}
        focusVisibleRing="inside"
      >
        <RouterLink to={place.to}>{place.label}</RouterLink>
      </Link>
      {crumb ? (
        <>
          <Box as="span" color="inkSoft" aria-hidden="true">
            /
          </Box>
          <Box as="span" fontWeight="600" truncate flexShrink="0" maxW="60%" aria-current="page">
            {crumb}
          </Box>
        </>
      ) : null}
    </HStack>
  );
}
