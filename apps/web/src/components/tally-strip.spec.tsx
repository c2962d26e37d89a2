import { ChakraProvider } from '@chakra-ui/react';
import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { system } from '../lib/theme/system.js';
import { tallyGeometry, tallyWords } from './tally-geometry.js';
import { TallyStrip } from './tally-strip.js';

const shares = (entries: Record<number, number | null>) =>
  Object.entries(entries).map(([order, sharePercent]) => ({ order: Number(order), sharePercent }));

/** Top of each tick: y of every `M x y`. */
const tops = (path: string) => [...path.matchAll(/M[\d.]+ ([\d.]+)/g)].map((match) => Number(match[1]));
const lefts = (path: string) => [...path.matchAll(/M([\d.]+) /g)].map((match) => Number(match[1]));

describe('tally strip', () => {
  it('lets what is over by little cross the limit line, and nothing else', () => {
    const strip = tallyGeometry(shares({ 3: 100, 5: 100.1, 7: 99 }), 20);
    expect(tops(strip.over)[0]).toBeLessThan(strip.limitY);
    expect(Math.min(...tops(strip.within))).toBeGreaterThanOrEqual(strip.limitY);
  });

  it('draws half a limit half way up to the line', () => {
    const strip = tallyGeometry(shares({ 3: 50 }), 20);
    expect(tops(strip.within)[0]).toBeCloseTo((strip.limitY + 19.5) / 2, 1);
  });

  it('keeps what is far over inside the strip', () => {
    expect(tops(tallyGeometry(shares({ 3: 4000 }), 20).over)[0]).toBeGreaterThanOrEqual(0);
  });

  it('marks next to nothing as a dot and leaves a gap where there is no limit', () => {
    const strip = tallyGeometry(shares({ 2: 0.4, 3: null }), 20);
    expect(lefts(strip.dots)).toHaveLength(1);
    expect(strip.within + strip.over).toBe('');
  });

  it('groups the orders so that each group ends at a multiple of five', () => {
    const [five = 0, six = 0, seven = 0] = lefts(tallyGeometry(shares({ 5: 50, 6: 50, 7: 50 }), 20).within);
    expect(six - five).toBeGreaterThan(seven - six);
  });

  it('says the same in words', () => {
    expect(tallyWords(shares({ 3: 51, 15: 113, 19: 112 }))).toBe('over at 15 and 19');
    expect(tallyWords(shares({ 15: 113, 19: 112, 21: 104, 23: 101 }))).toBe('over at 15, 19 and 2 more');
    expect(tallyWords(shares({ 3: 100 }))).toBe('within');
    expect(tallyWords(shares({ 3: null }))).toBe('no limit for these orders');
  });

  it('is one image with its words for screen readers', () => {
    render(
      <ChakraProvider value={system}>
        <TallyStrip shares={shares({ 3: 120 })} />
      </ChakraProvider>,
    );
    expect(screen.getByRole('img', { name: 'over at 3' })).toBeTruthy();
  });
});
